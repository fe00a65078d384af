import { Figure, Figures } from "@/app/_components/figure";
import { PageHeader } from "@/app/_components/page-header";
import { Section } from "@/app/_components/section";
import { numberText, settingText } from "@/app/_format/figures";
import { requirePerson } from "@/app/_server/require-person";
import { listProtected } from "@/lib/services/list-protected";
import { ProtectedTable } from "./protected-table";

export const metadata = { title: "Protected objects" };

export default async function ProtectedPage() {
  const person = await requirePerson("read book");
  const list = await listProtected(person, Date.now());
  const unusable = list.classes.reduce((sum, { unusableCount }) => sum + unusableCount, 0);
  return (
    <>
      <PageHeader title="Protected objects" aside={`${numberText(list.objects.length)} objects`}>
        No beam may come near them, at any range, in front of the fragment or beyond it. Crewed spacecraft
        close a dwell without override; one without a usable element set closes the whole pass.
      </PageHeader>
      <div className="grid gap-5">
        <Section
          title="What is kept free"
          intro={`Half-angle around the beam; the age of both element sets is added, and ${list.timingGuardS} s at each edge. A set is used for ${list.usableSetDays} days from its epoch.`}
        >
          <div className="grid gap-x-8 gap-y-5 sm:grid-cols-2 xl:grid-cols-4">
            {list.classes.map((one) => (
              <div key={one.class} className="border-t-2 border-ink pt-2">
                <h3 className="font-semibold">
                  {one.class}
                  {one.class === "crewed" ? (
                    <span className="font-normal text-quiet">, never lifted</span>
                  ) : null}
                </h3>
                <div className="mt-2">
                  <Figures label={`Figures of class ${one.class}`}>
                    <Figure
                      value={settingText(one.halfAngleDeg)}
                      unit="°"
                      label="half-angle"
                      note={one.halfAngleSource}
                    />
                    <Figure value={numberText(one.count)} label="objects" />
                    <Figure value={numberText(one.unusableCount)} label="without a usable set" />
                  </Figures>
                </div>
                <p className="mt-2 text-[0.8125rem] text-quiet">{one.halfAngleSource}</p>
              </div>
            ))}
          </div>
          {unusable > 0 ? (
            <p className="mt-4 border-l-4 border-dwell pl-3">
              {numberText(unusable)} {unusable === 1 ? "object has" : "objects have"} no usable element set:
              passes read “not checked” or closed for them until a newer set is imported.
            </p>
          ) : null}
        </Section>
        <ProtectedTable objects={list.objects} />
      </div>
    </>
  );
}
