/** Why a sheet was not filed, and what would file it; the page of the case shows it above what was typed. */
export interface FilingTrouble {
  readonly title: string;
  readonly sentences: readonly string[];
  readonly links: readonly { readonly address: string; readonly words: string }[];
  /** a button that files it after all; `supersedes` is what it sends */
  readonly button: { readonly supersedes: string; readonly words: string } | null;
}
