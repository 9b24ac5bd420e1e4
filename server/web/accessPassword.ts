import { createHmac, randomBytes, timingSafeEqual } from "node:crypto";
import { isPassword, type PasswordHash } from "../password.js";
import { type Allowance, tokenBuckets } from "./rateLimit.js";

export type PasswordAnswer =
  | { readonly kind: "right" }
  | { readonly kind: "wrong" }
  /** too many were tried; nothing was checked */
  | { readonly kind: "wait"; readonly wait_s: number };

export type PasswordCheck = (password: string, client: string) => Promise<PasswordAnswer>;

/** Tries of one client: a few slips of the finger, then 2,880 a day. */
const perClient: Allowance = { burst: 5, perSecond: 1 / 30 };

/** Tries of all: many addresses together must not keep the server busy with hashing. */
const together: Allowance = { burst: 20, perSecond: 1 / 2 };

/**
 * Checks passwords, one at a time because each takes memory and a processor. The right one is remembered, as a keyed
 * digest that only this process can make, so that programs, which send it each time, are answered at once and a flood
 * of wrong ones does not shut them out.
 *
 * @param now ms; tests bring their own
 */
export function passwordCheck(hash: PasswordHash, now?: () => number): PasswordCheck {
  const key = randomBytes(32);
  const ofClient = tokenBuckets(perClient, now);
  const ofAll = tokenBuckets(together, now);
  let remembered: Buffer | null = null;
  let before: Promise<unknown> = Promise.resolve();

  function isRemembered(digest: Buffer): boolean {
    return remembered !== null && timingSafeEqual(remembered, digest);
  }

  return async (password, client) => {
    const digest = createHmac("sha256", key).update(password).digest();
    if (isRemembered(digest)) return { kind: "right" };
    const wait_s = ofClient.take(client) || ofAll.take("");
    if (wait_s > 0) return { kind: "wait", wait_s };
    const check = before.then(() => isRemembered(digest) || isPassword(password, hash));
    before = check.catch(() => undefined);
    if (!(await check)) return { kind: "wrong" };
    remembered = digest;
    ofClient.refill(client);
    return { kind: "right" };
  };
}
