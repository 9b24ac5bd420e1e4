import type { FormBlock, FormControl, FormField, FormSection } from "../case/formShape.js";
import type { Fault } from "../case/read.js";

/** Where on the page a JSON pointer of the case document is, and what it is called there. */
export interface Place {
  /** id of the control, group or section */
  readonly id: string;
  /** as a reader finds it: "Vessel, coolant: temperature" */
  readonly label: string;
}

/** Every place of a form by its JSON pointer. */
export type Places = ReadonlyMap<string, Place>;

export interface ListedFault extends Fault {
  readonly label: string;
  readonly target: string | null;
}

/** The id of the control of that name, such as "at-mixture-mass". */
export function controlId(name: string): string {
  return `at${name.replace(/[^A-Za-z0-9]+/g, "-")}`;
}

export function placesOf(sections: readonly FormSection[]): Places {
  const places = new Map<string, Place>();
  for (const section of sections) {
    places.set(`/${section.id}`, { id: `section-${section.id}`, label: section.title });
    addBlocks(places, section.blocks, section.title);
  }
  return places;
}

function addBlocks(places: Map<string, Place>, blocks: readonly FormBlock[], within: string): void {
  for (const block of blocks) {
    if (block.type === "field") {
      addField(places, block, within);
    } else {
      const label =
        block.title === "" || block.title === within ? within : `${within}, ${lowered(block.title)}`;
      places.set(block.pointer, { id: controlId(block.pointer), label });
      addBlocks(places, block.type === "list" ? block.entries : block.blocks, label);
    }
  }
}

function addField(places: Map<string, Place>, field: FormField, within: string): void {
  const label = `${within}: ${lowered(field.label)}`;
  const place = { id: controlId(field.name), label };
  places.set(field.pointer, place);
  places.set(field.name, place);
  for (const control of controlsOf(field)) {
    // The control names its field as well, which the label has said already.
    const part = control.label.split(":")[0] ?? "";
    places.set(control.name, { id: controlId(control.name), label: `${label}, ${lowered(part)}` });
  }
}

function controlsOf({ detail }: FormField): readonly FormControl[] {
  return detail === undefined ? [] : [detail.standardError, detail.basis, detail.source];
}

/** Trade symbols keep their capitals. */
function lowered(label: string): string {
  return /^[A-Z][a-z]/.test(label) ? label.charAt(0).toLowerCase() + label.slice(1) : label;
}

/** The place of a pointer, or of the nearest one above it that the form shows. */
export function placeAt(places: Places, pointer: string): Place | null {
  const found = places.get(pointer);
  if (found !== undefined || pointer === "") return found ?? null;
  return placeAt(places, pointer.slice(0, Math.max(0, pointer.lastIndexOf("/"))));
}

/** Faults with the places they lead to, in the order of the form. */
export function listFaults(faults: readonly Fault[], places: Places): readonly ListedFault[] {
  const order = [...places.keys()];
  return faults
    .map((fault) => {
      const place = placeAt(places, fault.pointer);
      return { ...fault, label: place?.label ?? "The case", target: place?.id ?? null };
    })
    .toSorted((one, other) => order.indexOf(one.pointer) - order.indexOf(other.pointer));
}
