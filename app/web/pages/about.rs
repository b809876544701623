//! What the program is, what it is not, and the usual cautions.

use crate::components::{Page, caution, verdict_mark};
use crate::visitor::Visitor;
use engineering::Verdict;
use maud::{Markup, html};

const CAUTIONS: [&str; 7] = [
    "Isolate, lock out, and prove dead at the terminals with a tester that was itself proved before and after. A display that is dark proves nothing.",
    "The DC bus holds its charge after the supply is off. Wait as long as the drive's manual says, then measure. A voltage shown here is a figure, never a clearance.",
    "Disconnect the motor cable from the drive before an insulation test. The output stage does not survive the test voltage.",
    "Discharge a winding for at least four times the test time before it is touched.",
    "A motor that is turned by its load makes voltage, a permanent-magnet motor always does.",
    "Keep clear of the shaft and what it drives. A drive may start by itself when supply, reference or a reset returns.",
    "The stop button of a drive's panel is no emergency stop, and a drive's output that is off is not isolated.",
];

/// Shows it.
pub async fn show(visitor: Visitor) -> Markup {
    let body = html! {
        p.lead { "Asleft is the commissioning book for variable-frequency drives: the values that stay in a drive when the startup engineer walks away from it, the readings behind them, and who took them when and with which instrument." }
        h2 { "Cautions" }
        @for words in CAUTIONS { (caution(words)) }
        p { "The drive's and the motor's manuals, local codes and licensed practice go before anything on these pages. Each limit on which safety may depend yields to the maker's." }
        h2 { "What it is not" }
        ul {
            li { "It is a book. It does not connect to a drive and changes nothing in one." }
            li { "It never says that it is safe to work, to energise or to touch. It records what a qualified person did and found." }
            li { "It holds no maker's parameter list. Firms bring their own code sheets." }
        }
        h2 { "Verdicts" }
        dl.facts {
            dt { (verdict_mark(Verdict::Within)) } dd { "Inside the limit by more than the instrument's doubt." }
            dt { (verdict_mark(Verdict::Marginal)) } dd { "Closer to the limit than the instrument can tell, or no instrument in calibration is named." }
            dt { (verdict_mark(Verdict::Outside)) } dd { "Beyond the limit." }
            dt { (verdict_mark(Verdict::NotAssessed)) } dd { "An input is missing; the panel names it." }
            dt { (verdict_mark(Verdict::Figure)) } dd { "A result without a limit." }
        }
        p { "Every verdict shows its working: formula, numbers, result, the limit and where it comes from, and what was assumed. It can be checked with a pocket calculator." }
        h2 { "Numbers" }
        p { "Decimal comma and point are both understood. A resistance may be typed as " b { "1.2G" } " or " b { "500k" } ". What can be read two ways, such as " b { "1,234" } ", is asked. What you typed is kept as you typed it." }
    };
    Page::new("About, and cautions", body).narrow().render(&visitor)
}
