import { createHash } from "node:crypto";
import { readdirSync, readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { dirname, extname, join } from "node:path";
import type { RequestHandler } from "express";
import { projectRoot } from "../settings.js";
import { compress } from "./compression.js";

interface Asset {
  readonly type: string;
  readonly version: string;
  readonly content: Buffer;
  readonly br: Buffer | null;
  readonly gzip: Buffer | null;
}

export interface Assets {
  /** The address of a file of public/ or of a font, with the version that lets browsers keep it for good. */
  address(path: string): string;
  serve: RequestHandler;
}

const types: Readonly<Record<string, string>> = {
  ".css": "text/css; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".svg": "image/svg+xml",
  ".woff2": "font/woff2",
};

const fontFolder = join(
  dirname(createRequire(import.meta.url).resolve("@ibm/plex-sans/package.json")),
  "fonts/split/woff2",
);
const fontFile = /^IBMPlexSans-(Regular|SemiBold)-(Latin1|Latin2|Greek|Pi)\.woff2$/;

/** Reads public/ and the fonts once; style sheets and scripts are compressed then, not at each request. */
export function loadAssets(): Assets {
  const folder = join(projectRoot, "public");
  const assets = new Map<string, Asset>();
  for (const name of readdirSync(folder)) {
    if (types[extname(name)] !== undefined) assets.set(`/${name}`, load(join(folder, name)));
  }
  for (const name of readdirSync(fontFolder).filter((each) => fontFile.test(each))) {
    assets.set(`/fonts/${name}`, load(join(fontFolder, name)));
  }

  return {
    address(path) {
      const asset = assets.get(path);
      if (asset === undefined) throw new Error(`No file ${path} in public/.`);
      return `${path}?v=${asset.version}`;
    },
    serve(request, response, next) {
      const asset = assets.get(request.path);
      if (asset === undefined || (request.method !== "GET" && request.method !== "HEAD")) return next();
      // Fonts are asked for by the style sheet, which names no version: they change with the package only.
      const lasting = request.query.v === asset.version || asset.type === types[".woff2"];
      response.set("Cache-Control", lasting ? "public, max-age=31536000, immutable" : "no-cache");
      response.set("Content-Type", asset.type);
      response.vary("Accept-Encoding");
      const encoding = request.acceptsEncodings("br", "gzip", "identity");
      const packed = encoding === "br" || encoding === "gzip" ? asset[encoding] : null;
      if (packed !== null) response.set("Content-Encoding", String(encoding));
      response.send(packed ?? asset.content);
    },
  };
}

function load(path: string): Asset {
  const content = readFileSync(path);
  const type = types[extname(path)] ?? "application/octet-stream";
  const text = extname(path) !== ".woff2";
  return {
    type,
    version: createHash("sha256").update(content).digest("hex").slice(0, 10),
    content,
    br: text ? compress(content, "br", 9) : null,
    gzip: text ? compress(content, "gzip", 9) : null,
  };
}
