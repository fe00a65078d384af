"use client";

import { useState } from "react";
import { DataTable } from "@/app/_components/data-table";
import { EmptyState } from "@/app/_components/empty-state";
import { Field } from "@/app/_components/field";
import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText, numberText, settingText } from "@/app/_format/figures";
import type { ProtectedObjectBody } from "@/lib/contracts/protected";

/** How many rows are drawn before somebody asks for the rest: a page of thousands is slow to read and to draw. */
const FIRST_ROWS = 60;

/** The objects, to be narrowed by class, words and usability. */
export function ProtectedTable({ objects }: { readonly objects: readonly ProtectedObjectBody[] }) {
  const [words, setWords] = useState("");
  const [kind, setKind] = useState("");
  const [all, setAll] = useState(false);
  const matching = objects.filter((object) => matches(object, words, kind));
  const shown = all ? matching : matching.slice(0, FIRST_ROWS);
  return (
    <section aria-label="Objects">
      <div className="mb-4 grid max-w-3xl gap-4 sm:grid-cols-2">
        <Field label="Name or catalogue number">
          {(control) => (
            <input
              {...control}
              type="search"
              value={words}
              onChange={(e) => setWords(e.currentTarget.value)}
            />
          )}
        </Field>
        <Field label="Class">
          {(control) => (
            <select {...control} value={kind} onChange={(e) => setKind(e.currentTarget.value)}>
              <option value="">all</option>
              {[...new Set(objects.map((object) => object.class))].map((name) => (
                <option key={name}>{name}</option>
              ))}
              <option value={UNUSABLE}>without a usable element set</option>
            </select>
          )}
        </Field>
      </div>
      <p role="status" className="mb-2 text-quiet">
        {numberText(matching.length)} of {numberText(objects.length)} objects
        {shown.length < matching.length ? `, the first ${shown.length} shown` : ""}
      </p>
      {matching.length === 0 ? <EmptyState title="No protected object matches" /> : <Rows objects={shown} />}
      {shown.length < matching.length ? (
        <button type="button" className="act mt-3" onClick={() => setAll(true)}>
          Show all {numberText(matching.length)}
        </button>
      ) : null}
    </section>
  );
}

const UNUSABLE = "unusable";

function matches(object: ProtectedObjectBody, words: string, kind: string): boolean {
  if (kind === UNUSABLE ? object.usable : kind !== "" && object.class !== kind) return false;
  const wanted = words.trim().toLowerCase();
  return object.name.toLowerCase().includes(wanted) || String(object.catalogNumber).includes(wanted);
}

function Rows({ objects }: { readonly objects: readonly ProtectedObjectBody[] }) {
  return (
    <DataTable
      caption="Protected objects"
      rows={objects}
      keyOf={(object) => object.id}
      columns={[
        { head: "Name", lead: true, cell: (object) => <b>{object.name}</b> },
        { head: "Catalogue", figure: true, cell: (object) => object.catalogNumber },
        { head: "Class", cell: (object) => object.class },
        {
          head: "Half-angle",
          figure: true,
          cell: (object) => <span title={object.halfAngleSource}>{settingText(object.halfAngleDeg)}°</span>,
        },
        { head: "Owner", cell: (object) => object.ownerName },
        {
          head: "Newest element set",
          figure: true,
          cell: ({ newestSet }) =>
            newestSet ? (
              <span title={newestSet.source}>
                <UtcTime at={newestSet.epochAt} />
                <span className="ml-2 text-[0.8125rem] text-quiet">{ageText(newestSet.ageH)}</span>
              </span>
            ) : (
              "none"
            ),
        },
        {
          head: "Screening",
          cell: (object) => (object.usable ? "screened" : <StateMark state="not checked" />),
        },
      ]}
    />
  );
}

/** An epoch may lie ahead: then the age is negative. */
function ageText(ageH: number): string {
  return ageH < 0 ? `${durationText(-ageH * 3600)} ahead` : `${durationText(ageH * 3600)} old`;
}
