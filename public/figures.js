// Answers a pointer over a plot with the values at the nearest place; its table has the same for everyone.

const svgNamespace = "http://www.w3.org/2000/svg";

/** The plot that was answered last. */
let answered = null;

/** The reading nearest to a place on the axis, 0 at its left end and 1 at its right end. */
function nearest(readings, place) {
  return readings.reduce((best, each) =>
    Math.abs(each[0] - place) < Math.abs(best[0] - place) ? each : best,
  );
}

/** A thin line across the plots at the place that is read. */
function lineIn(svg) {
  const old = svg.querySelector(".pointed");
  if (old !== null) return old;
  const line = document.createElementNS(svgNamespace, "line");
  line.setAttribute("class", "pointed");
  return svg.appendChild(line);
}

function silence() {
  if (answered === null) return;
  answered.querySelector(".pointed")?.remove();
  const output = answered.closest("figure")?.querySelector(".reading");
  if (output) output.textContent = "";
  answered = null;
}

function answer(event) {
  const svg = event.target.closest?.("svg[data-frame]") ?? null;
  const output = svg?.closest("figure")?.querySelector(".reading") ?? null;
  if (svg !== answered) silence();
  if (output === null) return;
  const [left, right, top, bottom] = svg.dataset.frame.split(" ").map(Number);
  const box = svg.getBoundingClientRect();
  const x = ((event.clientX - box.left) / box.width) * svg.viewBox.baseVal.width;
  const [at, text] = nearest(JSON.parse(output.dataset.readings), (x - left) / (right - left));
  const line = lineIn(svg);
  const across = left + at * (right - left);
  for (const [name, value] of Object.entries({ x1: across, x2: across, y1: top, y2: bottom })) {
    line.setAttribute(name, value);
  }
  if (output.textContent !== text) output.textContent = text;
  answered = svg;
}

document.addEventListener("pointermove", answer);
document.addEventListener("pointerdown", answer);
document.documentElement.addEventListener("pointerleave", silence);
