import { hashPassword, passwordFault, passwordHashText } from "../password.js";
import { exit, type Streams } from "./output.js";

const usage = `usage: npm run --silent access-hash

  reads a password, one line from standard input, and prints the line ACCESS_HASH=... for the
  environment of the server; the password itself cannot be read from that line

exit status: 0 done, 1 the password will not do, 2 usage
`;

/**
 * Prints the line of the environment that stands for an access password.
 *
 * @param readPassword null where the input ended without a line
 */
export async function accessHashCommand(
  args: readonly string[],
  readPassword: () => Promise<string | null>,
  streams: Streams,
): Promise<number> {
  if (args.length > 0) {
    streams.err(`A password on the command line would stand in its history; type it when asked.\n\n${usage}`);
    return exit.usage;
  }
  const password = await readPassword();
  const fault = password === null ? "No password came." : passwordFault(password);
  if (password === null || fault !== null) {
    streams.err(`${fault}\n`);
    return exit.refused;
  }
  streams.out(`ACCESS_HASH=${passwordHashText(await hashPassword(password))}\n`);
  return exit.done;
}
