import type { ReactNode } from "react";

/** A caution that belongs to what stands above it. Without children: the one for estimates. */
export function Caution({ children }: { readonly children?: ReactNode }) {
  return (
    <p className="mt-4 max-w-[75ch] border-l-4 border-dwell py-1 pl-3 text-sm text-quiet">
      {children ??
        "An estimate for planning. It is no safety stop and no clearance: follow your laser safety officer, your air unit and local codes."}
    </p>
  );
}

/** The caution that stands under every page. */
export function StandingCaution() {
  return (
    <footer className="mt-auto border-t border-line px-4 py-3 text-[0.8125rem] text-quiet sm:px-7">
      <p className="max-w-[110ch]">
        Dwellbook keeps plans and records. It is not a safety stop, not a NOTAM office and not a clearing
        authority: follow local codes and licensed practice.
      </p>
    </footer>
  );
}
