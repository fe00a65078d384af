"use client";

import Link from "next/link";
import { useState } from "react";
import { type Column, DataTable } from "@/app/_components/data-table";
import { Field } from "@/app/_components/field";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText, significantText } from "@/app/_format/figures";
import type { FragmentBody } from "@/lib/contracts/fragments";

const COLUMNS: readonly Column<FragmentBody>[] = [
  {
    head: "Fragment",
    lead: true,
    cell: (f) => (
      <Link prefetch={false} href={`/fragments/${f.id}`} className="link font-bold text-ink">
        {f.name}
      </Link>
    ),
  },
  { head: "Number", figure: true, cell: (f) => f.catalogNumber ?? f.localNumber ?? "none" },
  {
    head: "Element set",
    figure: true,
    cell: (f) => (f.newestSet ? `${durationText(f.newestSet.ageH * 3600)} old` : "none"),
  },
  {
    head: "Next pass",
    figure: true,
    cell: (f) => (f.nextPassAt ? <UtcTime at={f.nextPassAt} show="short" /> : "none in the coming week"),
  },
  { head: "Passes in 7 d", figure: true, cell: (f) => f.passesAhead },
  { head: "Mass", figure: true, cell: (f) => `${significantText(f.massKg, 2)} kg` },
  { head: "Area", figure: true, cell: (f) => `${significantText(f.areaM2, 2)} m²` },
  { head: "Material", cell: (f) => f.material },
  { head: "Engagements", figure: true, cell: (f) => f.engagementCount },
  {
    head: "Last fired",
    cell: (f) =>
      f.lastFiredAt ? (
        <>
          <span className="figures">
            <UtcTime at={f.lastFiredAt} show="short" />
          </span>
          {f.awaitsNewElements ? (
            <span className="block text-[0.8125rem] text-quiet">waits for a newer element set</span>
          ) : null}
        </>
      ) : (
        ""
      ),
  },
];

/** All fragments, narrowed by name or number as one types. */
export function FragmentTable({ fragments }: { readonly fragments: readonly FragmentBody[] }) {
  const [wanted, setWanted] = useState("");
  const text = wanted.trim().toLowerCase();
  const rows = fragments.filter((f) =>
    [f.name, f.catalogNumber, f.localNumber].some((v) =>
      String(v ?? "")
        .toLowerCase()
        .includes(text),
    ),
  );
  return (
    <div className="grid gap-4">
      <div className="max-w-72">
        <Field label="Name or number">
          {(control) => (
            <input {...control} type="search" value={wanted} onChange={(e) => setWanted(e.target.value)} />
          )}
        </Field>
      </div>
      <p role="status" className="text-quiet">
        {rows.length === fragments.length
          ? `${rows.length} fragments`
          : `${rows.length} of ${fragments.length} fragments`}
      </p>
      <div className="sheet min-w-0 overflow-hidden">
        <DataTable caption="Fragments" columns={COLUMNS} rows={rows} keyOf={(f) => f.id} />
      </div>
    </div>
  );
}
