import type { PassSheetBody } from "@/lib/contracts/passes";
import { sampleColumns } from "./sample-columns";

/** The samples of the pass as a table that scrolls in its own box. */
export function SamplesTable({ sheet }: { readonly sheet: PassSheetBody }) {
  const columns = sampleColumns(sheet.aimUnit);
  return (
    <section
      aria-label="Samples of the pass"
      // biome-ignore lint/a11y/noNoninteractiveTabindex: a scrolling box must be reachable by keyboard
      tabIndex={0}
      className="max-h-96 overflow-auto border border-line"
    >
      <table className="figures w-full text-[0.8125rem]">
        <thead className="sticky top-0 bg-sheet">
          <tr>
            {columns.map((c) => (
              <th key={c.csv} scope="col" className="px-2.5 py-1.5 text-right font-semibold text-quiet">
                {c.head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {sheet.samples.map((s) => (
            <tr key={s.at} className="border-t border-line">
              {columns.map((c) => (
                <td key={c.csv} className="px-2.5 py-1 text-right whitespace-nowrap">
                  {c.text(s)}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
