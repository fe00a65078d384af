"use client";

import Link from "next/link";
import { Button } from "@/app/_components/button";
import { Field } from "@/app/_components/field";
import type { LedgerSearch } from "./ledger-search";

/** What the ledger speaks of, in its own words. */
const SUBJECT_KINDS = ["engagement", "element import", "sweep", "person", "access token"] as const;

/** Filters as a plain form: they stand in the address, so a search can be kept and sent. */
export function LedgerFilters({ search }: { readonly search: LedgerSearch }) {
  return (
    <search>
      {/* A new key with each search, so that the fields show what was asked. */}
      <form
        key={JSON.stringify(search)}
        action="/ledger"
        className="mb-5 grid grid-cols-2 items-end gap-4 lg:grid-cols-[2fr_1.2fr_1.2fr_1.3fr_1.3fr_auto]"
      >
        <div className="col-span-2 lg:col-span-1">
          <Field label="Words in it" hint="who, what or why">
            {(control) => <input {...control} name="text" type="search" defaultValue={search.text} />}
          </Field>
        </div>
        <Field label="Who">
          {(control) => <input {...control} name="actor" type="search" defaultValue={search.actor} />}
        </Field>
        <Field label="About">
          {(control) => (
            <select {...control} name="subjectKind" defaultValue={search.subjectKind}>
              <option value="">anything</option>
              {SUBJECT_KINDS.map((kind) => (
                <option key={kind}>{kind}</option>
              ))}
            </select>
          )}
        </Field>
        <Field label="From" hint="UTC, included" error={search.fromProblem}>
          {(control) => (
            <input
              {...control}
              name="from"
              className="control figures"
              defaultValue={search.from}
              placeholder="2031-04-06 03:12"
            />
          )}
        </Field>
        <Field label="To" hint="UTC, not included" error={search.toProblem}>
          {(control) => (
            <input
              {...control}
              name="to"
              className="control figures"
              defaultValue={search.to}
              placeholder="2031-04-07"
            />
          )}
        </Field>
        {search.subjectId === "" ? null : <input type="hidden" name="subjectId" value={search.subjectId} />}
        <div className="flex items-center gap-4">
          <Button type="submit">Search</Button>
          <Link prefetch={false} href="/ledger" className="act">
            Clear
          </Link>
        </div>
      </form>
    </search>
  );
}
