// Shows how far a full screening is, by server-sent events. Without this script its page refreshes itself.

/** The events that are listened to, and the place that shows them. */
let followed = null;

/** Listens to the screening that the page shows now, and no longer to one that it shows no more. */
function follow() {
  const place = document.getElementById("progress");
  if (followed?.place === place) return;
  if (followed !== null) giveUp(followed);
  followed = place === null ? null : { place, source: new EventSource(place.dataset.events) };
  if (followed === null) return;
  const { source } = followed;
  source.addEventListener("progress", (event) => show(place, JSON.parse(event.data)));
  source.addEventListener("end", (event) => end(place, JSON.parse(event.data)));
  // A connection that broke is made anew by the browser; one that was refused is closed.
  source.addEventListener("error", () => {
    if (source.readyState === EventSource.CLOSED)
      end(place, { done: false, text: "The screening is not under way any more." });
  });
  place.querySelector("form").addEventListener("submit", cancel);
}

function show(place, { percent, text }) {
  const bar = place.querySelector("progress");
  if (percent === null) bar.removeAttribute("value");
  else bar.value = percent;
  place.querySelector(".progress-text").textContent = text;
}

/** Nobody waits any more for the screening of what stood in the fields before. */
function giveUp({ place, source }) {
  source.close();
  ask(place.querySelector("form")).catch(() => undefined);
}

/** Asks for the end of a screening. */
function ask(form) {
  return fetch(form.action, { method: "POST", redirect: "manual" });
}

/** The page of a case takes the result over itself; the page of a screening asks for its own anew. */
function end(place, { done, text }) {
  followed?.source.close();
  followed = null;
  const pending = place.closest("#pending");
  if (pending === null) location.reload();
  else if (done) document.dispatchEvent(new Event("screened"));
  else {
    pending.textContent = `${text} “Screen” begins anew.`;
    pending.setAttribute("role", "alert");
  }
}

/** The end comes with the events. */
async function cancel(event) {
  event.preventDefault();
  const form = event.currentTarget;
  form.querySelector("button").disabled = true;
  try {
    await ask(form);
  } catch {
    form.submit();
  }
}

document.addEventListener("outcome", follow);
follow();
