//! Proves the cross-examination of nameplates on plates made from published tables, each misread in every way.
#![expect(clippy::expect_used, reason = "a test stops at what it cannot go on from")]

#[path = "misreading/corpus.rs"]
mod corpus;
#[path = "misreading/corruption.rs"]
mod corruption;
#[path = "misreading/page.rs"]
mod page;
#[path = "misreading/proof.rs"]
mod proof;
