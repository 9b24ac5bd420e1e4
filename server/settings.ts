import { existsSync } from "node:fs";
import { isIP } from "node:net";
import { dirname, join, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import { type PasswordHash, readPasswordHash } from "./password.js";

/** What the environment decides, read once at the start. */
export interface Settings {
  /** 0 lets the system choose a free one */
  readonly port: number;
  readonly host: string;
  /** names under which a proxy, or the network, makes the server known */
  readonly publicHosts: readonly string[];
  /** null: no password, and nobody served but this machine */
  readonly accessHash: PasswordHash | null;
  /** absolute */
  readonly dataFolder: string;
  /** the longest that one screening, or one sheet, may take, s */
  readonly screenSeconds: number;
}

export type ReadSettings =
  | { readonly ok: true; readonly settings: Settings }
  | { readonly ok: false; readonly faults: readonly string[] };

/**
 * The folder that holds package.json, views and public: the same one whether this file
 * runs from the source or from the build.
 */
export const projectRoot: string = findRoot(dirname(fileURLToPath(import.meta.url)));

function findRoot(folder: string): string {
  if (existsSync(join(folder, "package.json"))) return folder;
  const parent = dirname(folder);
  if (parent === folder) throw new Error("No package.json stands above the program's own files.");
  return findRoot(parent);
}

const hashCommand = "`npm run --silent access-hash`";
const hostName = /^[a-z0-9]([a-z0-9.-]{0,251}[a-z0-9])?$/i;

/** Whether others than this machine may reach an address. What a name stands for is not looked up. */
export function isOpen(host: string): boolean {
  if (isIP(host) === 4) return !host.startsWith("127.");
  return host !== "::1" && host.toLowerCase() !== "localhost";
}

/** Reads the environment's part in what the server does; every fault says what came and what would do. */
export function readSettings(environment: Readonly<Record<string, string | undefined>>): ReadSettings {
  const faults: string[] = [];

  const portText = environment.PORT?.trim() || "3000";
  const port = Number(portText);
  if (!/^\d{1,5}$/.test(portText) || port > 65535) {
    faults.push(`PORT is "${portText}"; a whole number from 0 to 65535 would do, 3000 unless set.`);
  }

  const host = environment.HOST?.trim() || "127.0.0.1";
  if (isIP(host) === 0 && !hostName.test(host)) {
    faults.push(`HOST is "${host}"; an address or a host name would do, 127.0.0.1 unless set.`);
  }

  const publicHosts = (environment.PUBLIC_HOST ?? "").split(",").flatMap((each) => each.trim() || []);
  const noNames = publicHosts.filter((name) => !hostName.test(name));
  if (noNames.length > 0) {
    faults.push(
      `PUBLIC_HOST holds "${noNames[0]}"; host names without scheme and port would do, parted by commas.`,
    );
  }

  const hashText = environment.ACCESS_HASH?.trim() ?? "";
  const accessHash = readPasswordHash(hashText);
  if (hashText !== "" && accessHash === null) {
    // What stands there may be the password itself: it is not repeated.
    faults.push(`ACCESS_HASH is no hash of a password; what ${hashCommand} prints would do.`);
  }
  if (hashText === "" && (isOpen(host) || publicHosts.length > 0)) {
    const setting = isOpen(host) ? "HOST" : "PUBLIC_HOST";
    faults.push(
      `${setting} lets others reach the server, and it has no access password. Make one with ${hashCommand} and set the ACCESS_HASH that it prints.`,
    );
  }

  const dataFolder = resolve(projectRoot, environment.DATA_DIR?.trim() || "data");

  const secondsText = environment.SCREEN_SECONDS?.trim() || "30";
  const screenSeconds = Number(secondsText);
  if (!/^\d{1,4}$/.test(secondsText) || screenSeconds < 1 || screenSeconds > 3600) {
    faults.push(
      `SCREEN_SECONDS is "${secondsText}"; a whole number from 1 to 3600 would do, the longest that one screening may take, in seconds; 30 unless set.`,
    );
  }

  if (faults.length > 0) return { ok: false, faults };
  return { ok: true, settings: { port, host, publicHosts, accessHash, dataFolder, screenSeconds } };
}
