import type { NextRequest } from "next/server";
import { RequestError } from "@/app/_server/request-errors";
import type { UploadedFile } from "@/services/imports/imports";
import { MAX_FILE_BYTES } from "@/services/imports/read-table";

/** The form's other parts and its boundaries. */
const FORM_ALLOWANCE_BYTES = 64 * 1024;

/** What browsers and scripts call a CSV; spreadsheets register it as theirs on Windows. */
const csvTypes = [
  "text/csv",
  "text/plain",
  "text/tab-separated-values",
  "application/csv",
  "application/vnd.ms-excel",
  "application/octet-stream",
  "",
];

/** Reads no further than the limit, whatever content-length says. */
async function readBody(request: NextRequest): Promise<Uint8Array<ArrayBuffer>> {
  const limit = MAX_FILE_BYTES + FORM_ALLOWANCE_BYTES;
  const tooLarge = new RequestError("too_large", "The file is over 5 MB; split it.");
  if (Number(request.headers.get("content-length") ?? 0) > limit) throw tooLarge;
  if (!request.body) return new Uint8Array();
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  const reader = request.body.getReader();
  for (let part = await reader.read(); !part.done; part = await reader.read()) {
    bytes += part.value.byteLength;
    if (bytes > limit) throw tooLarge;
    chunks.push(part.value);
  }
  return new Uint8Array(Buffer.concat(chunks));
}

/**
 * The one file of a multipart form, in its part `file`.
 *
 * @throws {RequestError} when the request is no such form, or the file is not a CSV by its type or too large
 */
export async function readUpload(request: NextRequest): Promise<UploadedFile> {
  const contentType = request.headers.get("content-type") ?? "";
  if (!/^multipart\/form-data\b/i.test(contentType)) {
    throw new RequestError(
      "unsupported_media_type",
      "Send the file as the part “file” of a form (multipart/form-data).",
    );
  }
  const body = await readBody(request);
  let form: FormData;
  try {
    form = await new Response(body, { headers: { "content-type": contentType } }).formData();
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    throw new RequestError("malformed_form", "The form could not be read.");
  }
  const file = form.get("file");
  if (!(file instanceof File)) {
    throw new RequestError("malformed_form", "The form has no file in its part “file”.");
  }
  if (!csvTypes.includes(file.type.split(";")[0].trim().toLowerCase())) {
    throw new RequestError(
      "unsupported_media_type",
      `A CSV is wanted, and this is ${file.type}. Save the sheet as CSV and choose that file.`,
    );
  }
  const name = file.name
    .replace(/[\u0000-\u001f\u007f]/g, "")
    .trim()
    .slice(0, 200);
  return { name: name || "reservoirs.csv", bytes: new Uint8Array(await file.arrayBuffer()) };
}
