"use client";

import { type FormEvent, useState } from "react";
import useSWR from "swr";
import { announce } from "@/app/_client/announce";
import { FetchError, fetchJson, sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { DataTable } from "@/app/_components/data-table";
import { ErrorNote } from "@/app/_components/error-note";
import { errorOf, Field } from "@/app/_components/field";
import { Section } from "@/app/_components/section";
import { UtcTime } from "@/app/_components/utc-time";
import type { NewTokenBody, TokenBody } from "@/lib/contracts/account";
import { ShownOnce } from "./shown-once";

const PATH = "/api/account/tokens";

/** A person's tokens: make one, see when each was last used, revoke. */
export function TokenList({ initial }: { readonly initial: readonly TokenBody[] }) {
  const { data, mutate } = useSWR<{ tokens: readonly TokenBody[] }>(PATH, fetchJson, {
    fallbackData: { tokens: initial },
  });
  const [made, setMade] = useState<NewTokenBody | null>(null);
  const [error, setError] = useState<unknown>(null);

  const create = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = event.currentTarget;
    setError(null);
    try {
      setMade(await sendJson<NewTokenBody>(PATH, "POST", { label: new FormData(form).get("label") }));
      form.reset();
      await mutate();
    } catch (refusal) {
      setError(refusal);
    }
  };
  const revoke = async (token: TokenBody) => {
    setError(null);
    try {
      await sendJson(`${PATH}/${token.id}`, "DELETE");
      if (made?.id === token.id) setMade(null);
      announce(`The token “${token.label}” no longer opens anything.`);
      await mutate();
    } catch (refusal) {
      setError(refusal);
    }
  };
  const labelError = error instanceof FetchError ? errorOf(error.details, "label") : null;

  return (
    <Section
      title="Access tokens"
      intro="For scripts. A token can do what you can do, until you revoke it. It is shown once, when it is made."
    >
      <form onSubmit={create} className="mb-4 flex flex-wrap items-end gap-3">
        <div className="min-w-56 grow">
          <Field label="What it is for" error={labelError}>
            {(control) => <input {...control} name="label" maxLength={80} autoComplete="off" required />}
          </Field>
        </div>
        <Button type="submit">Make a token</Button>
      </form>
      <ErrorNote error={error} shownElsewhere={["label"]} />
      {made ? (
        <ShownOnce
          title={`The token for “${made.label}”`}
          label="New token"
          secret={made.token}
          onDone={() => setMade(null)}
        />
      ) : null}
      <Tokens tokens={data?.tokens ?? []} onRevoke={revoke} />
    </Section>
  );
}

interface TokensProps {
  readonly tokens: readonly TokenBody[];
  readonly onRevoke: (token: TokenBody) => void;
}

function Tokens({ tokens, onRevoke }: TokensProps) {
  if (tokens.length === 0) return <p className="text-quiet">You have no tokens.</p>;
  return (
    <DataTable
      caption="Your access tokens"
      rows={tokens}
      keyOf={(token) => token.id}
      columns={[
        { head: "For", lead: true, cell: (token) => <b>{token.label}</b> },
        { head: "Made", figure: true, cell: (token) => <UtcTime at={token.createdAt} /> },
        {
          head: "Last used",
          figure: true,
          cell: (token) => (token.lastUsedAt ? <UtcTime at={token.lastUsedAt} /> : "never"),
        },
        {
          head: "",
          cell: (token) => (
            <button type="button" className="act" onClick={() => onRevoke(token)}>
              Revoke<span className="sr-only"> {token.label}</span>
            </button>
          ),
        },
      ]}
    />
  );
}
