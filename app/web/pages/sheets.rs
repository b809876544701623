//! A drive's sheets: plates, cable, load, further inputs; generated from the field table, judged while they are typed.

pub mod frame;
pub mod keep;
pub mod live;
pub mod show;
