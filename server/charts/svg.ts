import type { Figure } from "./figure.js";
import type { Box } from "./geometry.js";
import { layout, type Width, widths } from "./layout.js";
import { type Primitive, rounded, type Stroke } from "./primitive.js";

const entities: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

/** Text as it may stand in XML: marked-up characters as entities, those that XML forbids replaced. */
function escaped(text: string): string {
  return text
    .replace(/[^\t\n\r\u0020-\uD7FF\uE000-\uFFFD\u{10000}-\u{10FFFF}]/gu, "\uFFFD")
    .replace(/[&<>"']/g, (character) => entities[character] ?? character);
}

function strokeClasses(stroke: Stroke | null): string {
  if (stroke === null) return "";
  return ` s ${stroke.weight}${stroke.dash === "solid" ? "" : ` ${stroke.dash}`}`;
}

function drawPrimitive(primitive: Primitive): string {
  switch (primitive.kind) {
    case "rect": {
      const { x, y, width, height, tone, fill, stroke } = primitive;
      return `<rect class="${tone} f-${fill}${strokeClasses(stroke)}" x="${x}" y="${y}" width="${width}" height="${height}"/>`;
    }
    case "path":
      return `<path class="${primitive.tone} f-${primitive.fill}${strokeClasses(primitive.stroke)}" d="${primitive.d}"/>`;
    case "text": {
      const { x, y, text, anchor, size, bold, tone, upright } = primitive;
      const classes = `${tone} t-${size}${bold ? " bold" : ""}${anchor === "start" ? "" : ` a-${anchor}`}`;
      const turned = upright ? ` transform="rotate(-90 ${x} ${y})"` : "";
      return `<text class="${classes}" x="${x}" y="${y}"${turned}>${escaped(text)}</text>`;
    }
  }
}

/** Where the plots of a figure with readings stand: left, right, top, bottom. */
function framed({ readings = [] }: Figure, frame: Box | null): string {
  if (frame === null || readings.length === 0) return "";
  const sides = [frame.left, frame.right, frame.top, frame.bottom].map(rounded);
  return ` data-frame="${sides.join(" ")}"`;
}

/** A figure at one width as an SVG element, named by its title and described by its sentence. */
export function drawSvgAt(figure: Figure, width: Width): string {
  const { width: across, height, primitives, frame } = layout(figure, width);
  const id = escaped(`${figure.id}-${width}`);
  return [
    `<svg class="figure figure-${width}" role="img" aria-labelledby="${id}-title" aria-describedby="${id}-desc"`,
    ` viewBox="0 0 ${across} ${height}"${framed(figure, frame)} xmlns="http://www.w3.org/2000/svg">`,
    `<title id="${id}-title">${escaped(figure.title)}</title>`,
    `<desc id="${id}-desc">${escaped(figure.sentence)}</desc>`,
    ...primitives.map(drawPrimitive),
    "</svg>",
  ].join("");
}

/**
 * A figure for the page: drawn for a wide and for a narrow window, of which public/figures.css shows one, so that
 * words keep their size on a telephone.
 */
export function drawSvg(figure: Figure): string {
  return (Object.keys(widths) as Width[]).map((width) => drawSvgAt(figure, width)).join("");
}
