import { Refusal, unreadable } from "@/lib/engagement/refusal";

const MEGABYTE = 1024 * 1024;

/**
 * The whole body as bytes. Reads as a stream and stops at the limit with 413,
 * whatever Content-Length said.
 */
export async function readBytes(request: Request, limitBytes = MEGABYTE): Promise<Uint8Array> {
  const tooLarge = () =>
    new Refusal(413, "too_large", `The body is larger than ${Math.floor(limitBytes / 1024)} KiB.`);
  if (Number(request.headers.get("content-length") ?? 0) > limitBytes) throw tooLarge();
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body?.getReader();
  for (;;) {
    const next = await reader?.read();
    if (!next || next.done) break;
    size += next.value.byteLength;
    if (size > limitBytes) {
      await reader?.cancel();
      throw tooLarge();
    }
    chunks.push(next.value);
  }
  return Buffer.concat(chunks);
}

/** The whole body as UTF-8 text; 400 when it is something else, 413 over the limit. */
export async function readText(request: Request, limitBytes = MEGABYTE): Promise<string> {
  const bytes = await readBytes(request, limitBytes);
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    throw unreadable("The body is not UTF-8 text.");
  }
}

/** The body as JSON; 400 when it can't be read, 413 over the limit (1 MiB unless given). */
export async function readJson(request: Request, limitBytes = MEGABYTE): Promise<unknown> {
  const text = await readText(request, limitBytes);
  try {
    return JSON.parse(text);
  } catch {
    throw unreadable("The body is not JSON.");
  }
}
