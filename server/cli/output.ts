/** Where a command writes: results, and what went wrong. */
export interface Streams {
  readonly out: (text: string) => void;
  readonly err: (text: string) => void;
}

/** Exit statuses of every command. */
export const exit = { done: 0, refused: 1, usage: 2 } as const;

/** The process's own streams. A reader that has gone, as in `| head`, ends the program without a complaint. */
export function standardStreams(): Streams {
  for (const stream of [process.stdout, process.stderr]) {
    stream.on("error", (error: NodeJS.ErrnoException) => {
      if (error.code !== "EPIPE") throw error;
    });
  }
  return {
    out: (text) => void process.stdout.write(text),
    err: (text) => void process.stderr.write(text),
  };
}

/**
 * Text for a terminal: what was typed into a case cannot move the cursor or colour a line.
 *
 * @param text may hold line breaks, which stay
 */
export function forTerminal(text: string): string {
  return text.replace(/[\p{Cc}\p{Cf}\p{Cs}\u2028\u2029]/gu, (character) =>
    character === "\n" ? character : `\\u{${(character.codePointAt(0) ?? 0).toString(16)}}`,
  );
}

/** The same on one line. */
export function onOneLine(text: string): string {
  return forTerminal(text.replace(/\s+/gu, " ").trim());
}

/** Why the operating system refused, in words. */
export function reasonOf(error: unknown): string {
  const code = error instanceof Error && "code" in error ? error.code : undefined;
  switch (code) {
    case "ENOENT":
      return "there is no such file or folder";
    case "EISDIR":
      return "it is a folder";
    case "EACCES":
    case "EPERM":
      return "access is denied";
    case "ENOSPC":
      return "the disk is full";
    case "ENOTDIR":
      return "part of the path is not a folder";
    default:
      return error instanceof Error ? error.message : String(error);
  }
}
