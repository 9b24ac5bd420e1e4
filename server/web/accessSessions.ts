import { createHmac, randomBytes, timingSafeEqual } from "node:crypto";

/** A working day: whoever signs in in the morning is not asked again before the evening. */
export const session_s = 12 * 3600;

/** Who has signed in. Nothing is kept of a session but those that were ended early. */
export interface Sessions {
  /** A new session, as the value of a cookie. */
  begin(): string;
  holds(value: string | undefined): boolean;
  end(value: string | undefined): void;
}

/**
 * Sessions are signed with a random key of this process. A key derived from the hash of the password would let
 * whoever reads the environment forge one; the price is that a restart asks everyone to sign in again.
 *
 * @param now ms since 1970; tests bring their own
 */
export function createSessions(now: () => number = Date.now): Sessions {
  const key = randomBytes(32);
  /** ended by signing out, each with the moment at which it would have ended anyway, ms */
  const ended = new Map<string, number>();

  function signature(claim: string): string {
    return createHmac("sha256", key).update(claim).digest("base64url");
  }

  /** @returns the end of the session, ms; null where the signature is not ours */
  function endOf(value: string | undefined): number | null {
    const [until = "", id = "", signed = "", ...more] = (value ?? "").split(".");
    if (more.length > 0 || !isSame(signed, signature(`${until}.${id}`))) return null;
    return Number(until);
  }

  return {
    begin() {
      const claim = `${now() + 1000 * session_s}.${randomBytes(16).toString("base64url")}`;
      return `${claim}.${signature(claim)}`;
    },
    holds(value) {
      const end = endOf(value);
      return end !== null && now() < end && !ended.has(value ?? "");
    },
    end(value) {
      const end = endOf(value);
      if (value === undefined || end === null) return;
      for (const [each, until] of ended) if (until <= now()) ended.delete(each);
      if (now() < end) ended.set(value, end);
    },
  };
}

function isSame(one: string, other: string): boolean {
  const [a, b] = [Buffer.from(one), Buffer.from(other)];
  return a.length === b.length && timingSafeEqual(a, b);
}
