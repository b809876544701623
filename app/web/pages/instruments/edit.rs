//! An instrument: add it, change it, put it away.

use super::accuracy;
use crate::components::{FieldInput, InputKind, Page, date_kind, field, form, main_button};
use crate::extract::segment;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, conflict_page, links};
use axum::extract::{FromRequestParts, State};
use axum::http::StatusCode;
use axum::http::request::Parts;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::people::{Instrument, Role};
use commissioning::{EventId, FieldError, InstrumentId};
use maud::{Markup, html};

/// The instrument named in the address, with the event it last came from.
#[derive(Clone, Debug)]
pub struct InstrumentAt(Instrument, Option<EventId>);

impl FromRequestParts<App> for InstrumentAt {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        let not_here = || PageError::not_found("This instrument");
        let id: InstrumentId = segment(parts, "instrument").await?.parse().map_err(|_| not_here())?;
        let installation = app.store.installation().await?;
        let instrument = installation.instruments.get(&id).ok_or_else(not_here)?;
        Ok(Self(instrument.clone(), installation.instrument_seen.get(&id).cloned()))
    }
}

/// The form of a new one.
pub async fn show_new(signed: Signed) -> Markup {
    page(&signed, &links::new_instrument(), None, None, &Posted::default(), &[])
}

/// Adds it.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep_new(State(app): State<App>, signed: Signed, posted: Posted) -> Result<Response, PageError> {
    let id = InstrumentId(posted.made("instrument")?);
    keep_as(&app, &signed, id, &links::new_instrument(), None, &posted).await
}

/// The form of one that is there.
pub async fn show(signed: Signed, InstrumentAt(instrument, seen): InstrumentAt) -> Markup {
    page(&signed, &links::instrument(instrument.id), Some(&instrument), seen.as_ref(), &Posted::default(), &[])
}

/// Changes it.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(
    State(app): State<App>,
    signed: Signed,
    InstrumentAt(instrument, _): InstrumentAt,
    posted: Posted,
) -> Result<Response, PageError> {
    keep_as(&app, &signed, instrument.id, &links::instrument(instrument.id), Some(&instrument), &posted).await
}

async fn keep_as(
    app: &App,
    signed: &Signed,
    id: InstrumentId,
    action: &str,
    before: Option<&Instrument>,
    posted: &Posted,
) -> Result<Response, PageError> {
    let text = |name: &str| posted.text(name).trim().to_owned();
    let instrument = Instrument {
        id,
        mark: text("mark"),
        description: text("description"),
        serial: text("serial"),
        due: text("due"),
        accuracy: accuracy::read(posted),
        active: posted.text("active") != "no",
    };
    match app.perform(signed, posted.act()?, Deed::KeepInstrument { instrument, seen: posted.seen("instrument") }).await
    {
        Ok(_) => Ok(Redirect::to(&links::instruments()).into_response()),
        Err(PageError::Fields { errors }) => {
            let seen = posted.seen("instrument").into_iter().next();
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(signed, action, before, seen.as_ref(), posted, &errors))
                .into_response())
        }
        Err(PageError::Stale { conflicts }) => {
            Ok(conflict_page::answer(&signed.visitor, action, None, posted, &conflicts))
        }
        Err(other) => Err(other),
    }
}

fn page(
    signed: &Signed,
    action: &str,
    instrument: Option<&Instrument>,
    seen: Option<&EventId>,
    posted: &Posted,
    errors: &[FieldError],
) -> Markup {
    let keeper = signed.visitor.is_any(&[Role::Engineer, Role::Supervisor, Role::Administrator]);
    let line = |name: &str, label: &str, value: Option<&String>| {
        FieldInput::new(name, label, InputKind::Line(120))
            .with(value.map_or("", String::as_str))
            .sent_back(posted, errors)
    };
    let due = FieldInput::new("due", "Calibration due", date_kind())
        .hint("Year-month-day. Left empty: never calibrated; its readings are marginal at best.")
        .with(instrument.map_or("", |i| i.due.as_str()));
    let active = FieldInput::new("active", "In use", InputKind::Flag)
        .needed()
        .with(if instrument.is_none_or(|i| i.active) { "yes" } else { "no" })
        .hint("Put away, it is not offered for new readings; readings taken with it keep it.");
    let title =
        instrument.map_or_else(|| "Add an instrument".to_owned(), |i| format!("{} · {}", i.mark, i.description));
    Page::new(title, html! {
        (form(&signed.visitor, action, html! {
            @if let Some(seen) = seen { input type="hidden" name="instrument.seen" value=(seen); }
            fieldset.plain disabled[!keeper] {
                div.pair {
                    (field(&line("mark", "Mark", instrument.map(|i| &i.mark)).hint("The firm's own: IT-07.").needed()))
                    (field(&line("description", "What it is", instrument.map(|i| &i.description)).hint("Insulation tester, multimeter, thermometer …").needed()))
                    (field(&line("serial", "Serial number", instrument.map(|i| &i.serial)).needed()))
                    (field(&due.sent_back(posted, errors)))
                }
                (field(&active.sent_back(posted, errors)))
                (accuracy::inputs(instrument.map_or(&[], |i| i.accuracy.as_slice()), posted, errors))
            }
            div.row { @if keeper { (main_button("Keep")) } a.b href=(links::instruments()) { "Back" } }
        }))
    })
    .render(&signed.visitor)
}
