"use client";

import Link from "next/link";
import { useState } from "react";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { type Column, DataTable } from "@/app/_components/data-table";
import { ErrorNote } from "@/app/_components/error-note";
import type { PersonBody } from "@/lib/contracts/people";
import { ChangePersonDialog } from "./change-person-dialog";
import { EndSessionsDialog } from "./end-sessions-dialog";

type Asked = { readonly what: "change" | "end sessions"; readonly person: PersonBody };

interface PeopleTableProps {
  readonly initial: readonly PersonBody[];
  readonly viewerId: string;
}

/** Everybody, with what an administrator may do about each. */
export function PeopleTable({ initial, viewerId }: PeopleTableProps) {
  const { data, error, mutate } = useSWR<{ people: readonly PersonBody[] }>("/api/people", fetchJson, {
    fallbackData: { people: initial },
  });
  const [asked, setAsked] = useState<Asked | null>(null);
  const done = () => {
    setAsked(null);
    void mutate();
  };
  return (
    <>
      <ErrorNote error={error} title="The list may be out of date" />
      <DataTable
        caption="People"
        rows={data?.people ?? []}
        keyOf={(person) => person.id}
        columns={[...COLUMNS, actionsColumn(viewerId, setAsked)]}
      />
      <ChangePersonDialog
        person={asked?.what === "change" ? asked.person : null}
        onClose={() => setAsked(null)}
        onDone={done}
      />
      <EndSessionsDialog
        person={asked?.what === "end sessions" ? asked.person : null}
        onClose={() => setAsked(null)}
        onDone={done}
      />
    </>
  );
}

const COLUMNS: readonly Column<PersonBody>[] = [
  {
    head: "Name",
    lead: true,
    cell: (person) => (
      <>
        <b>{person.name}</b>
        {person.active ? null : <span className="text-quiet"> (no longer active)</span>}
      </>
    ),
  },
  { head: "E-mail", cell: (person) => <span className="break-all">{person.email}</span> },
  {
    head: "Role",
    cell: (person) => (person.isSafetyOfficer ? `${person.role}, safety officer` : person.role),
  },
  { head: "Answers for", cell: (person) => person.authorityName },
  { head: "Live tokens", figure: true, cell: (person) => person.liveTokens },
];

function actionsColumn(viewerId: string, ask: (asked: Asked) => void): Column<PersonBody> {
  return {
    head: "",
    cell: (person) => (
      <div className="flex flex-wrap gap-x-5 gap-y-1">
        <button type="button" className="act" onClick={() => ask({ what: "change", person })}>
          Change<span className="sr-only"> {person.name}</span>
        </button>
        {person.id === viewerId ? (
          <Link prefetch={false} className="act" href="/account">
            Your account
          </Link>
        ) : (
          <button type="button" className="act" onClick={() => ask({ what: "end sessions", person })}>
            End sessions<span className="sr-only"> of {person.name}</span>
          </button>
        )}
        <Link prefetch={false} className="act" href={`/ledger?subjectKind=person&subjectId=${person.id}`}>
          Ledger<span className="sr-only"> of {person.name}</span>
        </Link>
      </div>
    ),
  };
}
