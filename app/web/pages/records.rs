//! The record: begun, read from top to bottom, remarked on, signed, accepted, returned, reopened.

pub mod accept;
pub mod begin;
pub mod changed;
pub mod closing;
pub mod remark;
pub mod reopen;
pub mod report;
pub mod report_end;
pub mod report_settings;
pub mod report_sheets;
pub mod report_step;
pub mod returned;
pub mod send_back;
pub mod sign;
pub mod signature;
