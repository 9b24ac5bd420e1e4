import { pointerOf } from "../case/faults.js";
import type { Leaf } from "../case/leaves.js";
import { memberOf } from "../case/outline.js";
import { readQuantity } from "../case/quantities.js";
import { readRate } from "../case/rates.js";
import { overallOrder, rateTyped, visitLeaves } from "../case/typed.js";
import { differenceText, numberText } from "../words/numbers.js";
import { differences } from "./differences.js";

/** One input in which two cases differ. */
export interface InputDifference {
  readonly label: string;
  /** as typed; "" where the case leaves it empty */
  readonly first: string;
  readonly second: string;
  /** how far the second is from the first; null where neither is a figure */
  readonly change: string | null;
}

/** Lists whose entries belong together by their names, wherever they stand. */
const namedLists = { failures: "Failure", slips: "Slip" } as const;

/** Every input in which two cases differ, in the order of the form; failures and slips are matched by name. */
export function inputDifferences(first: unknown, second: unknown): readonly InputDifference[] {
  return [
    ...rowsOf(withoutLists(first), withoutLists(second), (label) => label),
    ...Object.entries(namedLists).flatMap(([key, word]) => listDifferences(first, second, key, word)),
  ];
}

function withoutLists(document: unknown): unknown {
  if (typeof document !== "object" || document === null) return document;
  return Object.fromEntries(Object.entries(document).filter(([key]) => !Object.hasOwn(namedLists, key)));
}

function listDifferences(first: unknown, second: unknown, key: string, word: string): InputDifference[] {
  const [ones, others] = [byName(memberOf(first, key)), byName(memberOf(second, key))];
  return [...new Set([...ones.keys(), ...others.keys()])].flatMap((name): InputDifference[] => {
    const [one, other] = [ones.get(name), others.get(name)];
    const title = `${word} “${name}”`;
    if (one === undefined || other === undefined) {
      const said = (there: unknown) => (there === undefined ? "" : "given");
      return [{ label: title, first: said(one), second: said(other), change: null }];
    }
    return rowsOf({ [key]: [one] }, { [key]: [other] }, (label) =>
      label.replace(new RegExp(`^[^,:]*, ${word.toLowerCase()} 1`), () => title),
    );
  });
}

/** Entries by their names; of two with the same name the second is told apart. */
function byName(list: unknown): Map<string, unknown> {
  const found = new Map<string, unknown>();
  for (const entry of Array.isArray(list) ? list : []) {
    const name = String(memberOf(entry, "name") ?? "without a name");
    let key = name;
    for (let count = 2; found.has(key); count += 1) key = `${name}, ${count}`;
    found.set(key, entry);
  }
  return found;
}

function rowsOf(first: unknown, second: unknown, label: (text: string) => string): InputDifference[] {
  const figures = [figuresOf(first), figuresOf(second)] as const;
  return differences(first, second).map((each) => ({
    label: label(each.label),
    first: each.yours,
    second: each.theirs,
    change: changeText(figures[0].get(each.pointer), figures[1].get(each.pointer)),
  }));
}

/** A typed figure in the SI, and whether it is an absolute temperature. */
interface FigureTyped {
  readonly value: number;
  readonly absolute: boolean;
}

/** Every figure of a document that can be read, by its pointer. */
function figuresOf(document: unknown): ReadonlyMap<string, FigureTyped> {
  const figures = new Map<string, FigureTyped>();
  const order = overallOrder(document);
  visitLeaves(document, (leaf, value, path) => {
    const figure = figureOf(leaf, value, path[0] === "decomposition" ? 1 : order);
    if (figure !== null && Number.isFinite(figure.value)) figures.set(pointerOf(path), figure);
  });
  return figures;
}

function figureOf(leaf: Leaf, typed: unknown, order: number | null): FigureTyped | null {
  if (leaf.kind === "number") {
    const value = typeof typed === "number" ? typed : memberOf(typed, "value");
    return typeof value === "number" ? { value, absolute: false } : null;
  }
  const parts = rateTyped(limitOf(typed));
  if (parts === null) return null;
  if (leaf.kind === "quantity") {
    const read = readQuantity(parts.value, leaf.dimension);
    return read.ok ? { value: read.measured.value, absolute: leaf.dimension.absolute === true } : null;
  }
  if (leaf.kind !== "rate" || order === null) return null;
  const read = readRate(parts, order);
  return read.ok ? { value: read.k.value, absolute: false } : null;
}

/** The quantity inside a limit that carries more than one. */
function limitOf(typed: unknown): unknown {
  const inner = memberOf(typed, "value");
  return typeof inner === "object" ? inner : typed;
}

/** Temperatures differ by kelvin, everything else by a part of the first, or by a factor where that is large. */
function changeText(first: FigureTyped | undefined, second: FigureTyped | undefined): string | null {
  if (first === undefined || second === undefined) return null;
  const by = second.value - first.value;
  if (Math.abs(by) <= 1e-9 * Math.abs(first.value)) return "the same, typed otherwise";
  if (first.absolute)
    return signed(by, `${differenceText(Math.abs(by), "nearest", Math.abs(by) < 0.1 ? 3 : 1)}`);
  const ratio = second.value / first.value;
  if (!(ratio > 0) || !Number.isFinite(ratio)) return null;
  if (ratio >= 2 || ratio <= 0.5) return `${numberText(ratio)} times`;
  return signed(ratio - 1, `${numberText(100 * Math.abs(ratio - 1), 2)} %`);
}

function signed(value: number, size: string): string {
  return `${value < 0 ? "−" : "+"}${size}`;
}
