/** A moment as the list shows it, such as "2026-03-07 14:05 UTC". */
export function timeText(iso: string): string {
  return `${iso.slice(0, 16).replace("T", " ")} UTC`;
}
