// While failures and draws are being computed: asks again, and takes the answer without a new page.

const pause_ms = 2000;

function againSoon() {
  if (document.getElementById("running") !== null) setTimeout(askAgain, pause_ms);
}

async function askAgain() {
  try {
    const response = await fetch(location.href);
    const page = new DOMParser().parseFromString(await response.text(), "text/html");
    const fresh = page.getElementById("compared");
    const isDone = fresh !== null && page.getElementById("running") === null;
    // What is in sight stays as it is until there is more to show.
    if (isDone) document.getElementById("compared").replaceChildren(...fresh.childNodes);
  } catch {
    // A server that is away for a moment is asked again.
  }
  againSoon();
}

againSoon();
