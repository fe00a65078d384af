"use client";

import Link from "next/link";
import { type DragEvent, useState } from "react";
import { FetchError } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { ErrorNote } from "@/app/_components/error-note";
import { Field } from "@/app/_components/field";
import { Section } from "@/app/_components/section";
import { SweepProgress } from "@/app/_components/sweep/sweep-progress";
import type { ImportReportBody } from "@/lib/contracts/element-sets";
import { rejectedLines } from "./rejected-lines";
import { ImportReport } from "./report";
import { type ImportKind, KINDS, sendSets } from "./send-sets";

const MOST_BYTES = 10 * 1024 * 1024;

/** Choose, drop or paste element sets; look at the report; store the good ones. */
export function ImportForm() {
  const [text, setText] = useState("");
  const [source, setSource] = useState("");
  const [kind, setKind] = useState<ImportKind>("fragments");
  const [report, setReport] = useState<ImportReportBody | null>(null);
  const [busy, setBusy] = useState<"preview" | "commit" | null>(null);
  const [error, setError] = useState<unknown>(null);

  const take = async (file: File | undefined): Promise<void> => {
    if (!file) return;
    setReport(null);
    if (file.size > MOST_BYTES) {
      setError(
        new Error(`${file.name} has ${Math.ceil(file.size / 1048576)} MB; at most 10 MB are read at once.`),
      );
      return;
    }
    setError(null);
    setText(await file.text());
    setSource(file.name);
  };
  const send = async (preview: boolean): Promise<void> => {
    setBusy(preview ? "preview" : "commit");
    setError(null);
    try {
      setReport(await sendSets({ text, source: source || "pasted", kind, preview }));
    } catch (thrown) {
      setError(thrown);
    } finally {
      setBusy(null);
    }
  };
  const edit = (next: string): void => {
    setText(next);
    setReport(null);
  };
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-5">
      <Section title="Element sets" intro="TLE with or without name lines, or OMM as JSON, KVN, XML or CSV.">
        <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
          <DropBox onFile={(file) => void take(file)} source={source} />
          <Field
            label="Or paste them here"
            hint={source ? `Now: ${source}` : "Nothing leaves this page before you ask"}
          >
            {(control) => (
              <textarea
                {...control}
                className={`${control.className} figures min-h-36 text-[0.8125rem]`}
                spellCheck={false}
                wrap="off"
                value={text}
                onChange={(e) => edit(e.target.value)}
              />
            )}
          </Field>
          <Field
            label="They are"
            hint="Protected objects close the beam where they come near it; crewed spacecraft without exception"
          >
            {(control) => (
              <select
                {...control}
                className={`${control.className} max-w-80`}
                value={kind}
                onChange={(e) => {
                  setKind(KINDS.find((k) => k.value === e.target.value)?.value ?? "fragments");
                  setReport(null);
                }}
              >
                {KINDS.map((k) => (
                  <option key={k.value} value={k.value}>
                    {k.label}
                  </option>
                ))}
              </select>
            )}
          </Field>
          <div className="flex flex-wrap gap-3">
            <Button disabled={text.trim() === ""} busy={busy === "preview"} onClick={() => void send(true)}>
              Preview
            </Button>
            <Button
              look="solid"
              disabled={report === null || !report.preview || report.accepted === 0}
              busy={busy === "commit"}
              onClick={() => void send(false)}
            >
              {report?.preview
                ? `Store ${report.accepted} good ${report.accepted === 1 ? "set" : "sets"}`
                : "Store the good sets"}
            </Button>
          </div>
          <ErrorNote
            error={error}
            {...(error instanceof FetchError ? { title: "The element sets were not read" } : {})}
          />
        </div>
      </Section>
      {report ? <ImportReport report={report} text={text} /> : null}
      {report && report.rejected.length > 0 ? (
        <a
          className="link justify-self-start"
          download="refused-element-sets.txt"
          href={`data:text/plain;charset=utf-8,${encodeURIComponent(rejectedLines(report, text))}`}
        >
          Download the refused lines
        </a>
      ) : null}
      {report && !report.preview ? <Afterwards report={report} /> : null}
    </div>
  );
}

function DropBox(props: { readonly onFile: (file: File | undefined) => void; readonly source: string }) {
  const [over, setOver] = useState(false);
  const onDrop = (event: DragEvent): void => {
    event.preventDefault();
    setOver(false);
    props.onFile(event.dataTransfer.files[0]);
  };
  return (
    <label
      onDragOver={(e) => {
        e.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={onDrop}
      className={`flex min-h-24 cursor-pointer flex-wrap items-center gap-x-4 gap-y-2 rounded border-[1.5px] border-dashed p-4 focus-within:outline-2 ${over ? "border-dwell" : "border-quiet"}`}
    >
      <span>
        <span className="font-semibold">Choose a file</span>
        <span className="text-quiet"> or drop it here, up to 10 MB</span>
      </span>
      <input
        type="file"
        className="max-w-full text-[0.875rem] file:mr-3 file:min-h-9 file:rounded file:border file:border-ink file:bg-sheet file:px-3 file:font-semibold file:text-ink"
        accept=".tle,.txt,.json,.xml,.csv,.kvn,.omm"
        onChange={(e) => props.onFile(e.target.files?.[0])}
      />
    </label>
  );
}

function Afterwards({ report }: { readonly report: ImportReportBody }) {
  return (
    <Section title="What follows">
      {report.sweepId ? (
        <SweepProgress sweepId={report.sweepId} />
      ) : (
        <p>Nothing newer came in, so nothing is swept.</p>
      )}
      <p className="mt-3">
        <Link prefetch={false} className="link" href="/passes">
          Look at the passes
        </Link>
      </p>
    </Section>
  );
}
