"use client";

import { type FormEvent, useState } from "react";
import useSWR from "swr";
import { announce } from "@/app/_client/announce";
import { FetchError, fetchJson, sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { Dialog } from "@/app/_components/dialog";
import { ErrorNote } from "@/app/_components/error-note";
import { errorOf, Field } from "@/app/_components/field";
import { ROLES, type Role } from "@/lib/contracts/common";
import type { PersonBody } from "@/lib/contracts/people";

interface DialogProps {
  /** Whom it is about; null closes it. */
  readonly person: PersonBody | null;
  readonly onClose: () => void;
  readonly onDone: () => void;
}

/** Role, authority, safety duty and activity of one person, with the reason. */
export function ChangePersonDialog({ person, onClose, onDone }: DialogProps) {
  return (
    <Dialog open={person !== null} onClose={onClose} title={person ? `Change ${person.name}` : "Change"}>
      {person ? <ChangeForm person={person} onDone={onDone} /> : null}
    </Dialog>
  );
}

function ChangeForm({ person, onDone }: { readonly person: PersonBody; readonly onDone: () => void }) {
  const [role, setRole] = useState<Role>(person.role);
  const [error, setError] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const details = error instanceof FetchError ? error.details : [];

  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    setBusy(true);
    setError(null);
    try {
      await sendJson(`/api/people/${person.id}`, "PATCH", {
        role,
        authorityId: role === "coordinator" ? form.get("authorityId") || null : null,
        isSafetyOfficer: form.get("isSafetyOfficer") === "on",
        active: form.get("active") === "on",
        reason: form.get("reason"),
      });
      announce(`${person.name} is changed; their sessions have ended.`);
      onDone();
    } catch (refusal) {
      setError(refusal);
      setBusy(false);
    }
  };

  return (
    <form onSubmit={submit} className="grid gap-4">
      <Field label="Role" error={errorOf(details, "role")}>
        {(control) => (
          <select {...control} value={role} onChange={(event) => setRole(event.currentTarget.value as Role)}>
            {ROLES.map((name) => (
              <option key={name}>{name}</option>
            ))}
          </select>
        )}
      </Field>
      {role === "coordinator" ? (
        <AuthorityField chosen={person.authorityId} error={errorOf(details, "authorityId")} />
      ) : null}
      <Tick
        name="isSafetyOfficer"
        label="Safety officer: may be the second to confirm"
        on={person.isSafetyOfficer}
      />
      <Tick
        name="active"
        label="Active: may sign in. Taking this away revokes all tokens."
        on={person.active}
      />
      <Field label="Reason" hint="Stands in the ledger." error={errorOf(details, "reason")}>
        {(control) => <input {...control} name="reason" maxLength={300} autoComplete="off" required />}
      </Field>
      <ErrorNote error={error} shownElsewhere={["role", "authorityId", "reason"]} />
      <Button type="submit" look="solid" busy={busy} className="justify-self-start">
        Change
      </Button>
    </form>
  );
}

function AuthorityField({
  chosen,
  error,
}: {
  readonly chosen: string | null;
  readonly error: string | null;
}) {
  const { data, error: failure } = useSWR<{ authorities: readonly { id: string; name: string }[] }>(
    "/api/authorities",
    fetchJson,
  );
  return (
    <Field
      label="Answers for"
      error={error ?? (failure ? "The list of authorities can’t be read just now." : null)}
    >
      {(control) => (
        // A new key when the list arrives, so that the present authority is chosen in it.
        <select
          {...control}
          key={data ? "listed" : "waiting"}
          name="authorityId"
          defaultValue={chosen ?? ""}
          required
        >
          <option value="">{data ? "Choose an authority" : "Reading…"}</option>
          {data?.authorities.map((authority) => (
            <option key={authority.id} value={authority.id}>
              {authority.name}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}

function Tick({ name, label, on }: { readonly name: string; readonly label: string; readonly on: boolean }) {
  return (
    <label className="flex items-baseline gap-2.5">
      <input type="checkbox" name={name} defaultChecked={on} className="translate-y-0.5" />
      {label}
    </label>
  );
}
