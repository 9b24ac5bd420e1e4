import type { Request } from "express";

/** A case as a form hands it over: chosen as a file, or pasted. */
export interface Upload {
  readonly text: string;
  readonly pasted: boolean;
}

/**
 * Reads a form with a file (multipart/form-data) from its raw body. The file counts where
 * one was chosen, the pasted text otherwise.
 *
 * @returns null where the body is no such form
 */
export async function readUpload(request: Request): Promise<Upload | null> {
  const form = await readForm(request);
  if (form === null) return null;
  const file = form.get("file");
  const text = form.get("text");
  if (file instanceof File && file.size > 0) return { text: await file.text(), pasted: false };
  return { text: typeof text === "string" ? text : "", pasted: true };
}

/**
 * The fields of such a form. The reader is the one that Node carries for fetch.
 *
 * @returns null where the body is no such form
 */
export async function readForm(request: Request): Promise<FormData | null> {
  const type = request.headers["content-type"];
  if (!Buffer.isBuffer(request.body) || type === undefined) return null;
  return new Response(new Uint8Array(request.body), { headers: { "content-type": type } })
    .formData()
    .catch(() => null);
}
