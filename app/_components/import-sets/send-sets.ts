import { FetchError } from "@/app/_client/fetch-json";
import type { ErrorBody } from "@/lib/contracts/common";
import type { ImportReportBody } from "@/lib/contracts/element-sets";

export type ImportKind = "fragments" | "crewed" | "payload" | "optical payload" | "own";

export const KINDS: readonly { readonly value: ImportKind; readonly label: string }[] = [
  { value: "fragments", label: "fragments, to be nudged" },
  { value: "payload", label: "protected: payloads" },
  { value: "optical payload", label: "protected: optical payloads" },
  { value: "crewed", label: "protected: crewed spacecraft" },
  { value: "own", label: "protected: our own" },
];

/**
 * Sends a text of element sets. The report comes back whether any set was good
 * (200) or none (422); every other answer is thrown as a FetchError.
 */
export async function sendSets(args: {
  readonly text: string;
  readonly source: string;
  readonly kind: ImportKind;
  readonly preview: boolean;
}): Promise<ImportReportBody> {
  const query = new URLSearchParams();
  if (args.preview) query.set("preview", "1");
  if (args.kind !== "fragments") {
    query.set("as", "protected");
    query.set("class", args.kind);
  }
  const form = new FormData();
  form.set("file", new File([args.text], args.source, { type: "text/plain" }));
  const response = await fetch(`/api/element-sets?${query}`, { method: "POST", body: form }).catch(
    () => null,
  );
  if (response === null)
    throw new FetchError(0, "unreachable", "The server can't be reached. Nothing was stored.");
  const body: unknown = await response.json().catch(() => null);
  if (isReport(body)) return body;
  const error = (body as ErrorBody | null)?.error;
  throw new FetchError(
    response.status,
    error?.code ?? "unexpected",
    error?.message ?? `The server answered with status ${response.status}.`,
    error?.details ?? [],
  );
}

function isReport(body: unknown): body is ImportReportBody {
  const report = body as Partial<ImportReportBody> | null;
  return typeof report?.accepted === "number" && Array.isArray(report.rejected);
}
