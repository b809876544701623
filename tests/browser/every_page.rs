//! Every kind of page, at three sizes, in daylight and in the dark: nothing runs off the screen, nothing is too small or too faint.

use super::program::Program;
use super::tablet::Tablet;
use super::{LYING, TELEPHONE, TURN, UPRIGHT, measure};
use std::collections::BTreeSet;

/// Pages of the demo, who opens them, and what the picture is called. `*` is anyone, before signing in.
const PAGES: &[(&str, &[(&str, &str)])] = &[
    ("*", &[("sign-in", "/sign-in"), ("invitation", "/invitation"), ("about", "/about")]),
    (
        "startup engineer",
        &[
            ("home", "/"),
            ("sites", "/sites"),
            ("board", "/sites/gannet-haven"),
            ("site-sheet", "/sites/gannet-haven/-/site"),
            ("new-drive", "/sites/gannet-haven/-/new-drive"),
            ("drive-fresh", "/sites/gannet-haven/P-110"),
            ("drive-under-way", "/sites/gannet-haven/S-320"),
            ("drive-held", "/sites/gannet-haven/P-210"),
            ("sheet-motor", "/sites/gannet-haven/M-150/motor"),
            ("sheet-drive-plate", "/sites/gannet-haven/S-320/drive-plate"),
            ("step-note", "/sites/gannet-haven/S-320/steps/permit"),
            ("step-prove-dead", "/sites/gannet-haven/S-320/steps/prove-dead"),
            ("step-plate", "/sites/gannet-haven/M-150/steps/motor-nameplate"),
            ("step-photo", "/sites/gannet-haven/S-320/steps/terminal-links"),
            ("step-reading", "/sites/gannet-haven/S-320/steps/test-voltage"),
            ("step-insulation", "/sites/gannet-haven/P-210/steps/insulation-to-earth"),
            ("step-balance", "/sites/gannet-haven/S-320/steps/winding-resistance"),
            ("step-table", "/sites/gannet-haven/H-410/steps/uncoupled-run"),
            ("step-scaling", "/sites/gannet-haven/H-410/steps/reference-scaling"),
            ("step-settings", "/sites/gannet-haven/S-320/steps/set-limits"),
            ("step-left", "/sites/gannet-haven/P-620/steps/settings-as-left"),
            ("otherwise", "/sites/gannet-haven/S-320/steps/set-limits/otherwise?how=not-applicable"),
            ("parameters", "/sites/gannet-haven/S-320/parameters"),
            ("parameters-group", "/sites/gannet-haven/S-320/parameters/motor-data"),
            ("hold", "/sites/gannet-haven/P-210/hold/energise"),
            ("hold-released", "/sites/gannet-haven/S-320/hold/energise"),
            ("findings", "/sites/gannet-haven/P-210/findings"),
            ("record-under-way", "/sites/gannet-haven/P-210/record"),
            ("sign-unfinished", "/sites/gannet-haven/S-320/sign"),
            ("record-returned", "/sites/gannet-haven/P-620/record"),
            ("sign", "/sites/gannet-haven/P-620/sign"),
            ("package", "/sites/gannet-haven/F-710/package"),
            ("journal", "/sites/gannet-haven/F-710/journal"),
            ("find", "/find?q=pump"),
            ("password", "/password"),
            ("not-found", "/sites/gannet-haven/Q-999"),
        ],
    ),
    (
        "supervisor",
        &[
            ("home-supervisor", "/"),
            ("queue", "/queue"),
            ("review", "/sites/gannet-haven/V-510/record"),
            ("accept", "/sites/gannet-haven/V-510/accept"),
            ("return", "/sites/gannet-haven/V-510/return"),
            ("reopen", "/sites/gannet-haven/F-710/reopen"),
            ("accepted", "/sites/gannet-haven/F-710"),
            ("not-allowed", "/people"),
        ],
    ),
    (
        "administrator",
        &[
            ("people", "/people"),
            ("new-person", "/new-person"),
            ("person", "/people/bram"),
            ("signers", "/signers"),
            ("instruments", "/instruments"),
            ("new-instrument", "/new-instrument"),
            ("new-site", "/new-site"),
        ],
    ),
];

#[tokio::test]
async fn every_page_at_three_sizes_in_both_themes() {
    let _turn = TURN.lock().await;
    let demo = Program::demo();
    let tablet = Tablet::new(&demo.address, UPRIGHT, "pages").await;
    let mut faults = BTreeSet::new();
    for (who, pages) in PAGES {
        if *who != "*" {
            tablet.sign_in(&demo.person(who)).await;
        }
        for (name, path) in *pages {
            faults.extend(look(&tablet, name, path).await);
        }
        if *who != "*" {
            tablet.turn(UPRIGHT).await;
            tablet.sign_out().await;
        }
    }
    assert!(faults.is_empty(), "{} faults:\n{}", faults.len(), faults.into_iter().collect::<Vec<_>>().join("\n"));
}

/// Looks at a page at every size and in both themes.
async fn look(tablet: &Tablet, name: &str, path: &str) -> Vec<String> {
    let mut faults = Vec::new();
    tablet.turn(UPRIGHT).await;
    tablet.open(path).await;
    // An answer that says no is logged by the browser as a failed file; that is what these two pages are about.
    let refused = ["not-found", "not-allowed"].contains(&name);
    let complaints = tablet.complaints().await;
    faults.extend(
        complaints
            .into_iter()
            .filter(|c| !refused || !c.contains("the server responded with a status of 40"))
            .map(|c| format!("{name}: {c}")),
    );
    for scheme in ["light", "dark"] {
        tablet.prefer(scheme).await;
        for size in [UPRIGHT, LYING, TELEPHONE] {
            tablet.turn(size).await;
            let measured = measure::page(tablet).await;
            assert!(measured.targets > 0 && measured.texts > 3, "{name} shows something: {measured:?}");
            faults.extend(measured.faults(&format!("{name} at {} wide, {scheme}", size.0)));
            tablet.whole_picture(&format!("{name}-{}-{scheme}", size.0), size).await;
            if size == LYING {
                // What is seen without scrolling, foot bar and all.
                tablet.picture(&format!("{name}-screen-{scheme}")).await;
            }
        }
    }
    faults
}
