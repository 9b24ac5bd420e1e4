/** One control of the form. */
export interface FormControl {
  /** name of the control: the JSON pointer of where its text goes */
  readonly name: string;
  readonly label: string;
  /** exactly as typed, nonsense included */
  readonly value: string;
  readonly kind: "text" | "choice";
  readonly choices?: readonly FormChoice[];
  readonly fault?: string;
}

/** One word of a choice; the one without a value leaves the field empty. */
export interface FormChoice {
  readonly value: string;
  readonly label: string;
}

/** A field with its label, and for a quantity the controls that say how well it is known. */
export interface FormField {
  readonly type: "field";
  /** name of the control: its pointer, or the one below it that holds the value */
  readonly name: string;
  /** JSON pointer of the field in the case document */
  readonly pointer: string;
  readonly label: string;
  readonly kind: "text" | "number" | "quantity" | "choice";
  readonly value: string;
  readonly choices?: readonly FormChoice[];
  /** a text that would do: "such as 150 kg" */
  readonly unitHint?: string;
  readonly hint?: string;
  /** where most values lie: "Typically 0.7 to 1.5 kg/L, most liquids" */
  readonly typical?: string;
  /** what a quantity was understood as, in the SI: "= 308.15 K" */
  readonly readBack?: string;
  /** must be filled wherever its group is used */
  readonly required: boolean;
  readonly fault?: string;
  readonly detail?: {
    readonly standardError: FormControl;
    readonly basis: FormControl;
    readonly source: FormControl;
    /** one of them is filled, or has a fault */
    readonly used: boolean;
  };
}

/** A submit button; its name is `do`. */
export interface FormButton {
  readonly value: string;
  readonly label: string;
}

/** The working of a field, below what it is given. */
export interface FormWorking {
  /** JSON pointer of the field that it fills */
  readonly field: string;
  readonly title: string;
  /** what was worked out on the way, and the result last; empty until everything needed is there */
  readonly rows: readonly { readonly label: string; readonly equation: string; readonly text: string }[];
  /** whether the field follows, and how plausible the result is */
  readonly notes: readonly string[];
  /** fills the field */
  readonly button: FormButton;
  /** gives the field back what it held before it was filled; kept in a hidden control */
  readonly undo?: { readonly button: FormButton; readonly name: string; readonly value: string };
}

/** Fields that belong together. */
export interface FormGroup {
  readonly type: "group";
  readonly pointer: string;
  readonly title: string;
  readonly intro?: string;
  readonly blocks: readonly FormBlock[];
  /** faults of the group itself */
  readonly faults: readonly string[];
  /** adds the group, or removes it */
  readonly button?: FormButton;
  /** what the fields are given for */
  readonly working?: FormWorking;
}

/** A text area for rows pasted from a spreadsheet, which a button takes over into their list. */
export interface FormPaste {
  readonly name: string;
  readonly text: string;
  /** a heading that would do: "Temperature [degC]" */
  readonly example: string;
  /** what becomes of the rows already there; absent where there are none */
  readonly placing?: FormControl;
  readonly button: FormButton;
  readonly fault?: string;
  /** asked before the text can be read, with the answers as buttons */
  readonly question?: string;
  readonly answers: readonly FormButton[];
  /** what was done with the last text */
  readonly told?: string;
}

/** An entry to begin with, and what it asks. */
export interface FormStart {
  readonly button: FormButton;
  readonly question: string;
}

/** Entries of one kind, as rows of a table or one group below the other. */
export interface FormList {
  readonly type: "list";
  readonly pointer: string;
  readonly title: string;
  readonly intro?: string;
  readonly layout: "rows" | "groups";
  readonly entries: readonly FormGroup[];
  readonly faults: readonly string[];
  /** absent where the list is full */
  readonly button?: FormButton;
  readonly paste?: FormPaste;
  /** entries to begin with */
  readonly starts?: readonly FormStart[];
}

export type FormBlock = FormField | FormGroup | FormList;

/** A part of the form under a heading of its own. */
export interface FormSection {
  /** fit for a fragment: "mixture" */
  readonly id: string;
  readonly title: string;
  readonly intro?: string;
  readonly blocks: readonly FormBlock[];
  readonly faults: readonly string[];
  readonly button?: FormButton;
}

/** Every field of a form, in order. */
export function fieldsOf(blocks: readonly (FormBlock | FormSection)[]): FormField[] {
  return blocks.flatMap((block) => {
    if ("blocks" in block) return fieldsOf(block.blocks);
    return block.type === "list" ? fieldsOf(block.entries) : [block];
  });
}

/** Every working of a form, in order. */
export function workingsShown(blocks: readonly (FormBlock | FormSection)[]): FormWorking[] {
  return blocks.flatMap((block): FormWorking[] => {
    if (!("blocks" in block)) return block.type === "list" ? workingsShown(block.entries) : [];
    const own = "working" in block && block.working !== undefined ? [block.working] : [];
    return [...own, ...workingsShown(block.blocks)];
  });
}

/** Name and value of every control of a form, as a browser would send them. */
export function formValues(sections: readonly FormSection[]): [string, string][] {
  const kept = workingsShown(sections).flatMap(({ undo }): [string, string][] =>
    undo === undefined ? [] : [[undo.name, undo.value]],
  );
  const fields = fieldsOf(sections).flatMap((field): [string, string][] => {
    const details =
      field.detail === undefined ? [] : [field.detail.standardError, field.detail.basis, field.detail.source];
    return [[field.name, field.value], ...details.map(({ name, value }): [string, string] => [name, value])];
  });
  return [...fields, ...kept];
}
