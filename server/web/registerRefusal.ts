/** Why a disk did not take what was to be written, for people. */
export interface DiskRefusal {
  readonly status: number;
  readonly sentence: string;
}

const full = new Set(["ENOSPC", "EDQUOT", "EFBIG"]);
const refusing = new Set([
  "EACCES",
  "EPERM",
  "EROFS",
  "EIO",
  "EMFILE",
  "ENFILE",
  "ENOTDIR",
  "ENODEV",
  "ESTALE",
]);

/**
 * What the operating system said, in words.
 *
 * @returns null where the error is not one of the disk
 */
export function diskRefusal(error: unknown): DiskRefusal | null {
  const code = error instanceof Error && "code" in error ? String(error.code) : "";
  if (full.has(code)) return { status: 507, sentence: "The disk of the server is full." };
  if (refusing.has(code)) return { status: 500, sentence: "The disk of the server refuses to be written." };
  return null;
}
