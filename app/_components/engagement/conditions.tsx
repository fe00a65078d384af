import type { NoticeBody } from "@/lib/contracts/engagements";
import { conditionsOf } from "./sheet-facts";

/** Conditions of the answers in force: whoever plans, confirms or fires must see them. */
export function Conditions({ notices }: { readonly notices: readonly NoticeBody[] }) {
  const conditions = conditionsOf(notices);
  if (conditions.length === 0) return null;
  return (
    <div className="border-l-4 border-dwell bg-sheet px-3 py-2">
      <h3 className="font-semibold">Conditions to keep</h3>
      <ul className="mt-1 grid gap-1">
        {conditions.map((c) => (
          <li key={c.id}>
            {c.words} <span className="text-quiet">({c.authority})</span>
          </li>
        ))}
      </ul>
    </div>
  );
}
