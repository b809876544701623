// Live verdicts while typing, and no double send. Every page works without this file.
const WAIT = 150;

/** Judges a form as it stands and puts the answer into the page's live region. */
function live(form) {
  const region = document.querySelector(form.dataset.region || "[data-live]");
  if (!region) return;
  let timer = 0;
  let under_way = null;
  const judge = async () => {
    under_way?.abort();
    under_way = new AbortController();
    const { signal } = under_way;
    try {
      const answer = await fetch(form.dataset.judge, {
        method: "POST",
        body: new URLSearchParams([...new FormData(form)].filter(([, value]) => typeof value === "string")),
        headers: { "x-asleft-live": "1" },
        credentials: "same-origin",
        redirect: "error",
        signal,
      });
      // Anything but an answer leaves what stands; the form itself will say what is wrong when it is sent.
      if (answer.ok) show(region, await answer.text());
    } catch {
      // Superseded by a later keystroke, or no network: the last verdicts stay, marked as such.
      if (!signal.aborted) region.dataset.stale = "";
    }
  };
  const soon = () => {
    clearTimeout(timer);
    timer = setTimeout(judge, WAIT);
  };
  form.addEventListener("input", soon);
  form.addEventListener("change", soon);
  // A form that the browser filled in again after going back.
  addEventListener("pageshow", (event) => { if (event.persisted) soon(); });
}

/** Replaces the region's inside; what was unfolded stays unfolded. */
function show(region, fragment) {
  const name = (fold) => (fold.parentElement.querySelector("h3")?.textContent ?? "") + fold.querySelector("summary").textContent;
  const open = new Set([...region.querySelectorAll("details[open]")].map(name));
  region.innerHTML = fragment;
  delete region.dataset.stale;
  for (const fold of region.querySelectorAll("details")) if (open.has(name(fold))) fold.open = true;
}

/** A second tap on the same button sends nothing; coming back to the page makes it usable again. */
function once(form) {
  form.addEventListener("submit", (event) => {
    if (form.dataset.sent !== undefined) event.preventDefault();
    else if (form.method === "post") form.dataset.sent = "";
  });
  addEventListener("pageshow", () => { delete form.dataset.sent; });
}

/** The menu closes when something else is touched, or with Escape. */
function menu(fold) {
  document.addEventListener("click", (event) => { if (!fold.contains(event.target)) fold.open = false; });
  fold.addEventListener("keydown", (event) => {
    if (event.key === "Escape") {
      fold.open = false;
      fold.querySelector("summary").focus();
    }
  });
}

/** Unfolds whatever a link into the page points at. */
function reveal() {
  // Our own places need no escapes, and a stranger's may not be decodable.
  const target = location.hash.length > 1 ? document.getElementById(location.hash.slice(1)) : null;
  if (!target) return;
  const folds = [];
  for (let at = target; at; at = at.parentElement) if (at.tagName === "DETAILS" && !at.open) folds.push(at);
  const own = target.querySelector(":scope > details.report-fold, :scope > details.phase");
  if (own && !own.open) folds.push(own);
  for (const fold of folds) fold.open = true;
  if (folds.length) target.scrollIntoView();
}

/** A sheet that was kept comes back where it stood; the word about it goes once something is typed. */
function kept(form) {
  const place = `asleft-place ${location.pathname}`;
  const told = document.getElementById("saved");
  form.addEventListener("submit", () => sessionStorage.setItem(place, String(scrollY)));
  const stood = sessionStorage.getItem(place);
  sessionStorage.removeItem(place);
  if (!told) return;
  if (stood !== null && !location.hash) scrollTo(0, Number(stood));
  form.addEventListener("input", () => told.remove());
}

function start() {
  document.querySelectorAll("form[data-judge]").forEach(live);
  document.querySelectorAll("form").forEach(once);
  document.querySelectorAll("details.menu").forEach(menu);
  document.querySelectorAll("form[data-keeps]").forEach(kept);
  reveal();
  addEventListener("hashchange", reveal);
  (document.querySelector("main [autofocus]") ?? document.querySelector(".faults[role=alert], .stay[role=alert]"))?.focus();
}

start();
