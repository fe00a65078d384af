import { ButtonLink } from "@/app/_components/button";
import { PageHeader } from "@/app/_components/page-header";
import type { PassBody } from "@/lib/contracts/passes";
import { BookParts, type BookPartsProps } from "./book-parts";
import { InTime } from "./in-time";
import { NextPass } from "./next-pass";

interface PlannerStartProps extends BookPartsProps {
  /** The next pass that offers a dwell, or null. */
  readonly pass: PassBody | null;
  readonly mayPropose: boolean;
  readonly mayImport: boolean;
  readonly fragmentCount: number;
}

/** A planner's day starts with the next pass worth lasing. */
export function PlannerStart(props: PlannerStartProps) {
  const { pass, nowMs, waiting, coming } = props;
  if (!pass) {
    return (
      <>
        <PageHeader
          title={
            props.fragmentCount === 0
              ? "No fragment is in the book yet"
              : "No pass of the coming week can be lased"
          }
          actions={props.mayImport ? <ButtonLink href="/import">Import element sets</ButtonLink> : null}
        >
          {props.fragmentCount === 0
            ? "Import element sets; their passes over the stations of the coming week are worked out at once."
            : "Newer element sets or answers from authorities may open some. The list of passes says what closes each."}
        </PageHeader>
        <BookParts coming={coming} waiting={waiting} nowMs={nowMs} />
      </>
    );
  }
  return (
    <>
      <PageHeader
        title={
          <>
            Your next pass worth lasing is <InTime atMs={Date.parse(pass.riseAt)} nowMs={nowMs} />
          </>
        }
      />
      <NextPass pass={pass} mayPropose={props.mayPropose} />
      <BookParts coming={coming} waiting={waiting} nowMs={nowMs} />
    </>
  );
}
