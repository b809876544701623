//! The board, the queue, the sites, the search and one's own work.

use super::stage::*;
use crate::{BoardFilter, StatusKey};
use commissioning::journal::{Change, Deed};
use commissioning::plant::{FieldKind, Sheet};
use commissioning::record::{Meaning, Severity};
use commissioning::{FindingId, SiteId};

fn filter(text: &str, status: Option<StatusKey>, page: u32) -> BoardFilter {
    BoardFilter { text: text.to_owned(), status, page }
}

#[test]
fn the_board_shows_drives_in_the_order_of_their_tags() {
    let store = stage();
    for (n, tag) in [(1, "P-10"), (2, "p-2"), (3, "FAN-1")] {
        create(&store, n, tag, "Pump");
    }
    let board = store.board_blocking(SITE, filter("", None, 1)).unwrap();
    assert_eq!(board.rows.iter().map(|r| r.tag.as_str()).collect::<Vec<_>>(), ["FAN-1", "p-2", "P-10"]);
    assert_eq!((board.page, board.pages, board.total), (1, 1, 3));
    assert!(store.board_blocking(SiteId(fresh()), filter("", None, 1)).unwrap().rows.is_empty());
}

#[test]
fn a_row_tells_how_far_the_record_is() {
    let store = stage();
    create(&store, 1, "P-1", "Feed pump");
    let row = |store: &crate::Store| store.board_blocking(SITE, filter("", None, 1)).unwrap().rows.remove(0);
    assert_eq!((row(&store).status, row(&store).revision, row(&store).phases[0].left), (StatusKey::NotBegun, 0, 2));
    done(&store, ROWAN, Deed::BeginRecord { drive: drive(1) }, at(4));
    done(&store, ROWAN, entry(&store, 1, "plate", "plate-read", "yes"), at(5));
    let finding = FindingId(fresh());
    let (severity, text) = (Severity::Information, "Paint scratched".to_owned());
    done(&store, ROWAN, Deed::RaiseFinding { drive: drive(1), finding, severity, text, step: None }, at(6));
    let half = row(&store);
    assert_eq!(
        (half.status, half.revision, half.open_findings, half.last_change),
        (StatusKey::InProgress, 1, 1, at(6))
    );
    assert_eq!((half.phases[0].id.as_str(), half.phases[0].short.as_str()), ("look", "Look"));
    assert_eq!((half.phases[0].left, half.phases[0].settled, half.phases[0].waits), (1, 1, false));
    done(&store, ROWAN, Deed::SettleFinding { drive: drive(1), finding, how: "Touched up".to_owned() }, at(7));
    done(&store, ROWAN, entry(&store, 1, "door", "door-closed", "yes"), at(8));
    done(&store, ROWAN, sign(&store, 1, Meaning::Performed), at(9));
    assert_eq!((row(&store).status, row(&store).open_findings), (StatusKey::Signed, 0));
    done(&store, MAREN, Deed::Return { drive: drive(1), reason: "Which plate?".to_owned() }, at(10));
    assert_eq!(row(&store).status, StatusKey::Returned);
    let text = "The one on the pump's foot.".to_owned();
    done(&store, ROWAN, Deed::Remark { drive: drive(1), step: "plate".to_owned(), text }, at(11));
    done(&store, ROWAN, sign(&store, 1, Meaning::Performed), at(11));
    done(&store, MAREN, sign(&store, 1, Meaning::Accepted), at(12));
    assert_eq!(row(&store).status, StatusKey::Accepted);
}

#[test]
fn the_board_filters_by_text_and_status_and_is_paged() {
    let store = stage();
    for n in 1..=60 {
        create(&store, n, &format!("P-{n}"), if n == 7 { "100% duty Mill" } else { "Feed pump" });
    }
    done(&store, ROWAN, Deed::BeginRecord { drive: drive(2) }, at(4));
    let tags = |filter| -> Vec<String> {
        store.board_blocking(SITE, filter).unwrap().rows.into_iter().map(|r| r.tag).collect()
    };
    assert_eq!(tags(filter("MILL", None, 1)), ["P-7"]);
    assert_eq!(tags(filter("100%", None, 1)), ["P-7"]);
    assert_eq!(tags(filter("%", None, 1)), ["P-7"]);
    assert_eq!(tags(filter("", Some(StatusKey::InProgress), 1)), ["P-2"]);
    assert!(tags(filter("mill", Some(StatusKey::InProgress), 1)).is_empty());
    let second = store.board_blocking(SITE, filter("", None, 2)).unwrap();
    assert_eq!((second.rows.len(), second.pages, second.total), (10, 2, 60));
    assert_eq!(second.rows[0].tag, "P-51");
}

#[test]
fn the_queue_shows_first_what_waited_longest() {
    let store = stage();
    signed(&store, 1, "P-1", 40);
    signed(&store, 2, "P-2", 20);
    signed(&store, 3, "P-3", 30);
    let queue = store.queue_blocking(1).unwrap();
    assert_eq!(queue.rows.iter().map(|r| r.row.tag.as_str()).collect::<Vec<_>>(), ["P-2", "P-3", "P-1"]);
    let first = &queue.rows[0];
    assert_eq!(
        (first.signed_at, first.signed_by.as_str(), first.site_tag.as_str()),
        (at(20), "Rowan Vale", "larch-ferry")
    );
    done(&store, MAREN, sign(&store, 2, Meaning::Accepted), at(50));
    assert_eq!(store.queue_blocking(1).unwrap().total, 2);
}

#[test]
fn sites_say_how_many_stand_where() {
    let store = stage();
    create(&store, 1, "P-1", "Pump");
    signed(&store, 2, "P-2", 20);
    let row = &store.sites_blocking().unwrap()[0];
    assert_eq!((row.drives, row.not_begun, row.in_progress, row.signed, row.accepted), (2, 1, 0, 1, 0));
    assert_eq!((row.tag.as_str(), row.count(StatusKey::Signed)), ("larch-ferry", 1));
}

#[test]
fn search_gives_tags_that_begin_so_first() {
    let store = stage();
    create(&store, 1, "KP-1", "Condensate pump");
    create(&store, 2, "P-1", "Return pump");
    create(&store, 3, "M-9", "Lift at p-1");
    let tags: Vec<String> = store.find_blocking("p-1").unwrap().into_iter().map(|r| r.tag).collect();
    assert_eq!(tags, ["P-1", "KP-1", "M-9"]);
    assert_eq!(store.find_blocking("LIFT").unwrap()[0].drive, drive(3));
    assert!(store.find_blocking("  ").unwrap().is_empty());
    assert!(store.find_blocking("_").unwrap().is_empty());
}

#[test]
fn rowan_sees_the_open_work_that_is_his() {
    let store = stage();
    for n in 1..=3 {
        create(&store, n, &format!("P-{n}"), "Pump");
        done(&store, ROWAN, Deed::BeginRecord { drive: drive(n) }, at(4));
    }
    done(&store, ROWAN, entry(&store, 1, "plate", "plate-read", "yes"), at(5));
    done(&store, TOVE, entry(&store, 2, "plate", "plate-read", "yes"), at(6));
    let mine =
        |who| -> Vec<String> { store.my_open_drives_blocking(who).unwrap().into_iter().map(|r| r.tag).collect() };
    assert!(mine(ROWAN).contains(&"P-1".to_owned()) && !mine(TOVE).contains(&"P-1".to_owned()));
    assert!(mine(TOVE).contains(&"P-2".to_owned()));
    assert!(mine(MAREN).is_empty());
}

#[test]
fn who_created_a_drive_or_filled_in_a_sheet_finds_it_before_its_record_is_begun() {
    let store = stage();
    create(&store, 1, "P-1", "Pump");
    let mine =
        |who| -> Vec<String> { store.my_open_drives_blocking(who).unwrap().into_iter().map(|r| r.tag).collect() };
    assert_eq!((mine(ROWAN), mine(TOVE), mine(MAREN)), (vec!["P-1".to_owned()], vec![], vec![]));
    let (key, option) = commissioning::plant::fields::of(Sheet::Motor)
        .iter()
        .chain(commissioning::plant::fields::in_columns(Sheet::Motor))
        .find_map(|f| match f.kind {
            FieldKind::Choice(options) => options.first().map(|(k, _)| (f.key, *k)),
            _ => None,
        })
        .expect("the motor sheet has a choice");
    let change = commissioning::journal::Change {
        place: (0, key.to_owned()),
        text: option.to_owned(),
        unit: String::new(),
        instrument: None,
        photo: None,
        seen: Vec::new(),
    };
    let fill =
        Deed::SetDriveFields { drive: drive(1), sheet: Sheet::Motor, changes: vec![change], reason: String::new() };
    done(&store, TOVE, fill, at(5));
    assert_eq!((mine(TOVE), mine(MAREN)), (vec!["P-1".to_owned()], vec![]));
}

#[test]
fn a_supply_filled_in_at_the_site_reaches_the_rows_of_its_drives() {
    let store = stage();
    create(&store, 1, "P-1", "Pump");
    // Some choice of the supply sheet; the door step then applies only where it was made.
    let (key, option) = commissioning::plant::fields::of(Sheet::Supply)
        .iter()
        .find_map(|f| match f.kind {
            FieldKind::Choice(options) => {
                options.iter().find(|(k, _)| !["none", "no"].contains(k)).map(|(k, _)| (f.key, *k))
            }
            _ => None,
        })
        .expect("the supply sheet has a choice");
    let mut procedure = short_procedure(2);
    procedure.phases[0].steps[1].when = vec![format!("{key}:{option}")];
    done(&store, IDA, Deed::LoadProcedure { procedure: Box::new(procedure) }, at(5));
    done(&store, ROWAN, Deed::BeginRecord { drive: drive(1) }, at(6));
    let left = || store.board_blocking(SITE, filter("", None, 1)).unwrap().rows[0].phases[0].left;
    assert_eq!(left(), 1);
    let place = (0, key.to_owned());
    let change =
        Change { place, text: option.to_owned(), unit: String::new(), instrument: None, photo: None, seen: Vec::new() };
    let (sheet, changes) = (Sheet::Supply, vec![change]);
    done(&store, ROWAN, Deed::SetSiteFields { site: SITE, sheet, changes, reason: String::new() }, at(9));
    assert_eq!(left(), 2);
    assert_eq!(store.compare_projections_blocking().unwrap(), Vec::<String>::new());
}

#[test]
fn a_new_procedure_reaches_the_rows_of_drives_without_a_record() {
    let store = stage();
    create(&store, 1, "P-1", "Pump");
    let mut next = short_procedure(2);
    next.phases[0].short = "See".to_owned();
    done(&store, IDA, Deed::LoadProcedure { procedure: Box::new(next) }, at(9));
    let row = store.board_blocking(SITE, filter("", None, 1)).unwrap().rows.remove(0);
    assert_eq!(row.phases[0].short, "See");
    assert_eq!(store.compare_projections_blocking().unwrap(), Vec::<String>::new());
}

#[test]
fn a_row_changed_behind_the_journal_is_noticed() {
    let store = stage();
    signed(&store, 1, "P-1", 20);
    for sql in [
        "UPDATE drives SET status = 'accepted', signed_at = NULL",
        "DELETE FROM contributors",
        "UPDATE people SET active = 0 WHERE login = 'rowan'",
        "UPDATE sites SET name = 'Elsewhere'",
        "DELETE FROM signatures",
    ] {
        let planted = store
            .writing()
            .give::<usize, crate::PerformFault, _>(move |desk| Ok(Ok(desk.connection.execute(sql, [])?)));
        assert!(planted.wait().unwrap() > 0, "{sql}");
        assert!(!store.compare_projections_blocking().unwrap().is_empty(), "{sql}");
    }
}
