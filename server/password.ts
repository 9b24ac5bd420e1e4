import { randomBytes, scrypt, timingSafeEqual } from "node:crypto";

/** What is kept of the access password: enough to know it again, not enough to tell it. */
export interface PasswordHash {
  /** scrypt's N, a power of two: with r it sets the memory that one try takes, 128 N r bytes */
  readonly cost: number;
  /** scrypt's r */
  readonly blockSize: number;
  /** scrypt's p */
  readonly parallelization: number;
  readonly salt: Buffer;
  readonly key: Buffer;
}

/** Characters of the shortest password, and bytes of the longest. */
const shortest = 12;
const longest_bytes = 1024;

/** 32 MiB and about a fifth of a second for one try; OWASP's password storage sheet asks for no less (from memory). */
const made = { cost: 2 ** 15, blockSize: 8, parallelization: 3 } as const;
const saltBytes = 16;
const keyBytes = 32;

/** A hash that wants more than this for one try would let a few of them bring the server down. */
const largestMemory_bytes = 128 * 2 ** 20;

/** @returns why a password will not do, null where it will */
export function passwordFault(password: string): string | null {
  const length = [...password].length;
  if (length < shortest) {
    return `The password has ${length} characters; ${shortest} or more would do, such as four words that do not belong together.`;
  }
  return isTooLong(password) ? `A password is at most ${longest_bytes} bytes long.` : null;
}

function isTooLong(password: string): boolean {
  return Buffer.byteLength(password) > longest_bytes;
}

/** Hashes a new password with a salt of its own. */
export async function hashPassword(password: string): Promise<PasswordHash> {
  const salt = randomBytes(saltBytes);
  return { ...made, salt, key: await derive(password, { ...made, salt }, keyBytes) };
}

/** Whether a password is the one that was hashed. Takes the memory and the time that the hash says. */
export async function isPassword(password: string, hash: PasswordHash): Promise<boolean> {
  if (isTooLong(password)) return false;
  return timingSafeEqual(await derive(password, hash, hash.key.length), hash.key);
}

/** Keyboards differ in how they compose a letter such as "ü"; the password is the same. */
function derive(
  password: string,
  { cost, blockSize, parallelization, salt }: Omit<PasswordHash, "key">,
  length: number,
): Promise<Buffer> {
  const options = { cost, blockSize, parallelization, maxmem: 2 * largestMemory_bytes };
  return new Promise((resolve, reject) => {
    scrypt(password.normalize("NFKC"), salt, length, options, (error, key) =>
      error === null ? resolve(key) : reject(error),
    );
  });
}

/** The hash on one line, made of letters that shells, unit files and compose files leave as they are. */
export function passwordHashText({ cost, blockSize, parallelization, salt, key }: PasswordHash): string {
  const numbers = [cost, blockSize, parallelization];
  return ["scrypt", ...numbers, salt.toString("base64url"), key.toString("base64url")].join(":");
}

/** @returns null where the text is no hash, or one that is too weak, or too costly to check */
export function readPasswordHash(text: string): PasswordHash | null {
  const match = /^scrypt:(\d{1,8}):(\d{1,2}):(\d{1,2}):([\w-]{16,128}):([\w-]{43,128})$/.exec(text);
  if (match === null) return null;
  const [cost = 0, blockSize = 0, parallelization = 0] = match.slice(1, 4).map(Number);
  const [salt = Buffer.alloc(0), key = Buffer.alloc(0)] = match
    .slice(4)
    .map((each) => Buffer.from(each, "base64url"));
  const powerOfTwo = Number.isInteger(Math.log2(cost));
  const memory_bytes = 128 * cost * blockSize;
  if (!powerOfTwo || cost < 2 ** 14 || blockSize < 8 || parallelization < 1) return null;
  return memory_bytes > largestMemory_bytes ? null : { cost, blockSize, parallelization, salt, key };
}
