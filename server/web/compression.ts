import { brotliCompressSync, constants, gzipSync } from "node:zlib";
import type { RequestHandler } from "express";

const worthwhile_bytes = 1024;

/** Compresses text answers (pages, drawings, JSON) as the client accepts; other bodies pass as they are. */
export function compressedText(): RequestHandler {
  return (request, response, next) => {
    const send = response.send.bind(response);
    response.send = (body?: unknown) => {
      // A page is made in a moment of its own; what was answered meanwhile is not answered again.
      if (response.headersSent) return response;
      if (typeof body !== "string" || body.length < worthwhile_bytes) return send(body);
      if (response.get("Content-Type") === undefined) response.type("html");
      response.vary("Accept-Encoding");
      const encoding = request.acceptsEncodings("br", "gzip", "identity");
      if (encoding !== "br" && encoding !== "gzip") return send(body);
      response.set("Content-Encoding", encoding);
      return send(compress(Buffer.from(body), encoding, 5));
    };
    next();
  };
}

/** @param effort 1 (fast) to 9 (small) */
export function compress(content: Buffer, encoding: "br" | "gzip", effort: number): Buffer {
  return encoding === "br"
    ? brotliCompressSync(content, { params: { [constants.BROTLI_PARAM_QUALITY]: effort } })
    : gzipSync(content, { level: effort });
}
