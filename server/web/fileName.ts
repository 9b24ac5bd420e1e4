/** A name for a download, from the title of its case: letters, digits and hyphens, at most 60 of them. */
export function fileName(title: string): string {
  const name = title
    .normalize("NFKD")
    .replace(/[^A-Za-z0-9]+/g, "-")
    .slice(0, 60)
    .replace(/^-+|-+$/g, "")
    .toLowerCase();
  return name === "" ? "case" : name;
}
