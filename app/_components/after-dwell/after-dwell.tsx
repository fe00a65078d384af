"use client";

import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { Caution } from "@/app/_components/caution";
import { ErrorNote } from "@/app/_components/error-note";
import { Section } from "@/app/_components/section";
import { UtcTime } from "@/app/_components/utc-time";
import { numberText } from "@/app/_format/figures";
import type { AfterDwellBody } from "@/lib/contracts/after-dwell";
import { ApproachTable } from "./approach-table";

/** A screening that still runs is asked after this often, ms. */
const SOON_MS = 5000;

/** The protected objects that the fragment comes near after the dwell, lased and left alone. */
export function AfterDwell({ engagementId }: { readonly engagementId: string }) {
  const { data, error } = useSWR<AfterDwellBody>(`/api/engagements/${engagementId}/after-dwell`, fetchJson, {
    revalidateOnFocus: false,
    refreshInterval: (latest) =>
      latest?.state === "done" || latest?.state === "refused" ? 10 * 60_000 : SOON_MS,
  });
  return (
    <Section
      title="After the dwell"
      intro={
        data ? (
          <>
            Protected objects nearer than {numberText(data.thresholdKm, 1)} km from <UtcTime at={data.from} />{" "}
            to <UtcTime at={data.to} />
            {data.updatedAt ? (
              <>
                , screened at <UtcTime at={data.updatedAt} />
              </>
            ) : null}
            .
          </>
        ) : undefined
      }
    >
      {error ? <ErrorNote error={error} title="The days after the dwell could not be read" /> : null}
      {data ? <Found body={data} /> : error ? null : <p className="text-quiet">Reading …</p>}
    </Section>
  );
}

function Found({ body }: { readonly body: AfterDwellBody }) {
  if (body.state === "waiting") return <p role="status">Not checked yet: a job will screen these days.</p>;
  if (body.state === "refused") return <p>Not checked: {body.reason}</p>;
  const paths = [
    { path: "nudged", caption: "Nudged by the dwell, at the median" },
    { path: "untouched", caption: "Untouched, as if nothing were fired" },
  ] as const;
  return (
    <div className="grid gap-5">
      {body.state === "running" ? (
        <p role="status">
          Not complete: {numberText(body.checked)} of {numberText(body.total)} protected objects looked at.
        </p>
      ) : null}
      {paths.map(({ path, caption }) => (
        <ApproachTable
          key={path}
          caption={caption}
          rows={body.approaches.filter((approach) => approach.path === path)}
          none={`No protected object ${body.state === "running" ? "so far " : ""}comes nearer than ${numberText(body.thresholdKm, 1)} km.`}
        />
      ))}
      {body.unseen.length > 0 ? (
        <details>
          <summary>Not checked: {numberText(body.unseen.length)} protected objects</summary>
          <ul className="mt-2 text-[0.8125rem] text-quiet">
            {body.unseen.map((line) => (
              <li key={line}>{line}</li>
            ))}
          </ul>
        </details>
      ) : null}
      <details>
        <summary>What these figures assume</summary>
        <ul className="mt-2 grid max-w-[80ch] gap-1.5 text-[0.8125rem] text-quiet">
          {body.assumptions.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      </details>
      <Caution>
        Advice for planning, from element sets without a covariance of their own. It clears nothing and warns
        nobody: satellite owners and the clearing authority decide.
      </Caution>
    </div>
  );
}
