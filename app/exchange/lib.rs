//! Spreadsheets, read-outs and code sheets in and out: bytes in, bytes out; no clock, no files, no store.

pub mod code_sheet;
pub mod readout;
pub mod rows;
pub mod schedule;
pub mod sheets;
pub mod workbook;
