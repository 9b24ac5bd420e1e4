// Improves the page of a case: findings follow the typing, and the form changes its shape
// without a new page. Everything here also works through the form's own buttons.

const form = document.getElementById("inputs");
const state = document.getElementById("state");
const pause_ms = 350;

let timer = 0;
let running = new AbortController();

/** The form as it would be sent, for one of its actions. */
function body(action) {
  const fields = new URLSearchParams(new FormData(form));
  if (action !== undefined) fields.set("do", action);
  return fields;
}

/** Sends the form; an older request that is still under way is given up. */
async function send(address, fields) {
  running.abort();
  running = new AbortController();
  const response = await fetch(address, { method: "POST", body: fields, signal: running.signal });
  // 422 comes with the page and its faults; any other refusal is not what was asked for.
  if (!response.ok && response.status !== 422) throw new Error("refused", { cause: response.status });
  return new DOMParser().parseFromString(await response.text(), "text/html");
}

/** Replaces the part of that id by the one of another document. */
function take(source, id) {
  const fresh = source.getElementById(id);
  const old = document.getElementById(id);
  if (fresh === null || old === null) return;
  old.replaceChildren(...fresh.childNodes);
}

/** Old findings stay in sight, but marked, until the fields are all understood again. */
function markStale(stale) {
  const findings = document.getElementById("findings");
  findings.classList.toggle("stale", stale && findings.childElementCount > 0);
}

/** Says in words that the findings in sight are older than the fields; not for the moment that an answer takes. */
function noteStale(stale) {
  const empty = document.getElementById("findings").childElementCount === 0;
  document.getElementById("stale-note").hidden = !stale || empty;
}

/** Puts each fault beside its field, where the field was touched, and takes away those that are gone. */
function showFaults() {
  const faults = new Map(
    [...document.querySelectorAll("#faults [data-pointer]")].map((item) => [
      item.dataset.pointer,
      item.dataset.message,
    ]),
  );
  for (const place of form.querySelectorAll(".fault")) {
    const message = faults.get(place.dataset.pointer);
    const control = document.getElementById(place.dataset.control);
    const touched = control?.matches("[data-touched], :has([data-touched])") === true;
    const shown = message !== undefined && (place.textContent !== "" || touched);
    place.textContent = shown ? message : "";
    if (!control?.matches("input, select")) continue;
    if (shown) control.setAttribute("aria-invalid", "true");
    else control.removeAttribute("aria-invalid");
  }
}

/** Tells beside each quantity what it was understood as; nothing where it was not. */
function showReads(source) {
  const reads = new Map(
    [...source.querySelectorAll("#reads [data-pointer]")].map((each) => [
      each.dataset.pointer,
      each.textContent,
    ]),
  );
  for (const place of form.querySelectorAll(".read")) {
    place.textContent = reads.get(place.dataset.pointer) ?? "";
  }
}

/** Asks for findings of what stands in the form; the full ones take seconds, and say so meanwhile. */
async function refresh(parts) {
  clearTimeout(timer);
  markStale(parts === "quick");
  try {
    const fresh = await send(`/findings?parts=${parts}`, body());
    if (fresh.getElementById("outcome") === null) {
      // The findings in sight stand; only how far the rest is was answered.
      take(fresh, "pending");
      document.dispatchEvent(new Event("outcome"));
      return;
    }
    take(fresh, "outcome");
    document.dispatchEvent(new Event("outcome"));
    showReads(fresh);
    for (const working of form.querySelectorAll("[data-working]")) take(fresh, working.id);
    const found = fresh.querySelector("#findings > *") !== null;
    if (found) take(fresh, "findings");
    markStale(!found);
    noteStale(!found);
    showFaults();
  } catch (error) {
    if (error.name === "AbortError") return;
    noteStale(true);
    const pending = document.getElementById("pending");
    if (error.cause === 403) {
      state.textContent = "You are signed out: sign in in another tab, then go on here";
    } else if (pending !== null) {
      pending.textContent = "The server did not answer. “Screen” asks again.";
    }
  }
}

function refreshSoon() {
  clearTimeout(timer);
  timer = setTimeout(refresh, pause_ms, "quick");
  dropProgress();
  state.textContent = state.dataset.changed;
}

/** A screening of what stood in the fields before is not wanted any more. */
function dropProgress() {
  document.getElementById("progress")?.remove();
  document.dispatchEvent(new Event("outcome"));
}

/** Has the failures and the draws computed where the page came without them: all findings, or the rest. */
function complete(parts) {
  const pending = document.getElementById("pending");
  if (pending === null || document.getElementById("progress") !== null) return;
  pending.textContent = pending.dataset.working;
  pending.setAttribute("role", "status");
  refresh(parts);
}

/** Lets the server draw the form anew, after a choice or a button that adds or removes fields. */
async function reshape(action) {
  clearTimeout(timer);
  const open = [...form.querySelectorAll("details[open]")].map((each) => each.id);
  const focused = document.activeElement?.id;
  const known = new Set([...form.querySelectorAll("[id]")].map((each) => each.id));
  const fresh = await send(form.action, body(action));
  take(fresh, "inputs");
  for (const id of open) document.getElementById(id)?.setAttribute("open", "");
  const added = [...form.querySelectorAll("input, select, textarea")].find(
    (each) => each.id !== "" && !known.has(each.id),
  );
  (action.startsWith("add") ? added : document.getElementById(focused))?.focus();
  refreshSoon();
}

/** The folded line under a quantity: how well it is known, as far as it was said. */
function tellKnown(details) {
  const [error, basis, source] = details.querySelectorAll("input, select");
  const parts = [
    error.value === "" ? "" : `± ${error.value}`,
    basis.value === "" ? "" : (basis.selectedOptions?.[0].textContent ?? basis.value),
    source.value,
  ].filter((part) => part !== "");
  const told = details.querySelector(".told");
  details.classList.toggle("is-told", parts.length > 0);
  told.textContent = parts.length > 0 ? parts.join(" · ") : told.dataset.empty;
}

form.addEventListener("input", (event) => {
  // What waits to be taken over into a table is no part of the case yet.
  if (event.target.name.startsWith("paste")) return;
  event.target.dataset.touched = "";
  const known = event.target.closest(".known");
  if (known !== null) tellKnown(known);
  refreshSoon();
});

form.addEventListener("change", (event) => {
  if (event.target.dataset.shapes === undefined) return;
  reshape("update").catch(() => form.requestSubmit(form.querySelector("[value=update]")));
});

form.addEventListener("click", (event) => {
  const button = event.target.closest("button[name=do]");
  if (
    button === null ||
    !/^(add|add-failure|remove|work|undo|paste|paste-decimal|paste-separates):/.test(button.value)
  )
    return;
  event.preventDefault();
  reshape(button.value).catch(() => form.requestSubmit(button));
});

// Not when the button says so alone: pressing Enter in a field screens as well.
form.addEventListener("submit", (event) => {
  const pending = document.getElementById("pending");
  if (event.submitter?.value !== "screen" || pending === null) return;
  event.preventDefault();
  complete("full");
});

document.addEventListener("screened", () => refresh("full"));

// Going back restores what was typed after the page was drawn: the findings must follow it.
addEventListener("pageshow", () => {
  const typed = [...form.elements].some(
    (each) => "defaultValue" in each && each.type !== "hidden" && each.value !== each.defaultValue,
  );
  if (typed) refreshSoon();
  else if (document.querySelector("#pending[data-held]") === null) complete("rest");
});
