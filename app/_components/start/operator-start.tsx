import { ButtonLink } from "@/app/_components/button";
import { PageHeader } from "@/app/_components/page-header";
import { BookParts, type BookPartsProps } from "./book-parts";
import { InTime } from "./in-time";

/** An operator's day starts with the next engagement. */
export function OperatorStart({ coming, waiting, nowMs }: BookPartsProps) {
  const [first] = coming;
  return (
    <>
      <PageHeader
        title={
          first ? (
            <>
              The next engagement is <InTime atMs={Date.parse(first.from)} nowMs={nowMs} />
            </>
          ) : (
            "No engagement is booked"
          )
        }
        actions={first ? <ButtonLink href="/watch">Open the watch</ButtonLink> : null}
      >
        {first
          ? `E-${first.number}: ${first.fragmentName} over ${first.stationName}, ${first.state}.`
          : "Planners propose dwells; what is cleared appears here for two people to confirm."}
      </PageHeader>
      <BookParts coming={coming} waiting={waiting} nowMs={nowMs} />
    </>
  );
}
