//! Faults at every point: one walk through the trade's acts is recorded call by call, and each point becomes a store to look at.
//!
//! A kill leaves the files as they were after the k-th call; a power cut leaves of what was not synced any part. Both
//! follow from one recording, so that every point is tried and none is drawn by lot. Real kills and real errors of the
//! disk, put on the running walk from outside, show that the recording tells the truth. Each kind of test is seen to
//! fail on a planted fault: an answer before its commit, a sync left out, a folder never synced.

mod examine;
mod power;
mod real;
mod recording;
mod replay;
mod running;
mod trials;
mod walk;
