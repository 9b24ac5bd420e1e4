import { createInterface } from "node:readline";
import { Writable } from "node:stream";

/**
 * One line of standard input, without its line break. At a terminal it is asked for and does not show.
 *
 * @returns null where the input ended before a line
 */
export async function typedPassword(): Promise<string | null> {
  const terminal = process.stdin.isTTY === true;
  if (terminal) process.stderr.write("Access password (it does not show): ");
  const unseen = new Writable({ write: (_chunk, _encoding, done) => done() });
  const lines = createInterface({ input: process.stdin, output: unseen, terminal });
  try {
    for await (const line of lines) return line;
    return null;
  } finally {
    lines.close();
    if (terminal) process.stderr.write("\n");
  }
}
