//! A page of a list.

/// Rows on a page.
const ROWS: u32 = 50;

/// A page of a list; pages count from 1.
#[derive(Clone, Debug, PartialEq)]
pub struct Page<T> {
    /// Its rows.
    pub rows: Vec<T>,
    /// Which page this is.
    pub page: u32,
    /// How many pages there are, at least 1.
    pub pages: u32,
    /// How many rows the whole list has.
    pub total: u64,
}

/// Where a page of a list begins and how much it holds.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) struct Cut {
    pub(crate) page: u32,
    pub(crate) pages: u32,
    pub(crate) total: u64,
    pub(crate) offset: i64,
    pub(crate) limit: i64,
}

impl Cut {
    /// The page asked for, or the last one where the list is shorter.
    pub(crate) fn of(total: i64, page: u32) -> Self {
        let total = total.unsigned_abs();
        let pages = u32::try_from(total.div_ceil(u64::from(ROWS))).unwrap_or(u32::MAX).max(1);
        let page = page.clamp(1, pages);
        Self { page, pages, total, offset: i64::from(page - 1) * i64::from(ROWS), limit: i64::from(ROWS) }
    }

    /// The page with its rows.
    pub(crate) fn page<T>(self, rows: Vec<T>) -> Page<T> {
        Page { rows, page: self.page, pages: self.pages, total: self.total }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_page_beyond_the_end_is_the_last() {
        assert_eq!(Cut::of(0, 7), Cut { page: 1, pages: 1, total: 0, offset: 0, limit: 50 });
        assert_eq!(Cut::of(50, 2).page, 1);
        assert_eq!(Cut::of(51, 9), Cut { page: 2, pages: 2, total: 51, offset: 50, limit: 50 });
        assert_eq!(Cut::of(51, 0).page, 1);
    }
}
