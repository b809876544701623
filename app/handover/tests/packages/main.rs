//! Whole packages of an invented drive: read with common tools, verified, changed and caught.

#[cfg(test)]
mod document;
#[cfg(test)]
mod plant;
#[cfg(test)]
mod proof;
#[cfg(test)]
mod tools;
