import { readBytes } from "@/app/_server/read-body";
import { unreadable } from "@/lib/engagement/refusal";
import type { ImportText } from "@/lib/services/read-texts";

const LIMIT_BYTES = 10 * 1024 * 1024;

/**
 * The texts of a request: the files of a form's field `file`, or its text of that name, or the raw body.
 * 413 over 10 MiB, 400 when there is nothing to read. What is no UTF-8 is left to the reader of files.
 */
export async function readImportTexts(request: Request): Promise<ImportText[]> {
  const bytes = await readBytes(request, LIMIT_BYTES);
  const type = request.headers.get("content-type") ?? "";
  const texts = /^multipart\/form-data/i.test(type)
    ? await textsOfForm(bytes, type)
    : [{ text: decode(bytes), source: "text sent to the API" }];
  const filled = texts.filter(({ text }) => text.trim() !== "");
  if (filled.length === 0) throw unreadable("The body is empty: send element sets as text or as files.");
  return filled;
}

async function textsOfForm(bytes: Uint8Array, type: string): Promise<ImportText[]> {
  const form = await new Response(Buffer.from(bytes), { headers: { "content-type": type } })
    .formData()
    .catch(() => {
      throw unreadable("The form can't be read.");
    });
  const parts = form.getAll("file");
  if (parts.length === 0) throw unreadable("The form has no field named file.");
  return Promise.all(
    parts.map(async (part) =>
      typeof part === "string"
        ? { text: part, source: "pasted text" }
        : { text: decode(new Uint8Array(await part.arrayBuffer())), source: fileName(part.name) },
    ),
  );
}

/** A file's name as a label: one line, without control characters, not too long. */
function fileName(name: string): string {
  const printable = [...name].filter((c) => c >= " " && c !== "\u007f").join("");
  return printable.trim().slice(0, 120) || "file without a name";
}

function decode(bytes: Uint8Array): string {
  return new TextDecoder("utf-8", { fatal: false, ignoreBOM: true }).decode(bytes);
}
