import Link from "next/link";
import type { ComponentProps } from "react";

type Look = "solid" | "plain" | "grave";

const SHAPE =
  "inline-flex min-h-10 items-center justify-center gap-2 rounded border-[1.5px] px-4 py-1.5 text-[0.9375rem] font-semibold disabled:border-dashed disabled:opacity-60";
const LOOKS: Record<Look, string> = {
  solid: "border-ink bg-ink text-sheet hover:bg-transparent hover:text-ink",
  plain: "border-ink bg-transparent text-ink hover:bg-ink hover:text-sheet",
  grave: "border-dwell bg-transparent text-dwell hover:bg-dwell hover:text-sheet",
};

interface ButtonProps extends ComponentProps<"button"> {
  /** solid: the one thing to do here; plain: other things; grave: ends or takes away something. */
  readonly look?: Look;
  /** While its work is under way: disabled, and says so. */
  readonly busy?: boolean;
}

/** A button; type="button" unless told otherwise. */
export function Button({
  look = "plain",
  busy = false,
  className = "",
  disabled,
  children,
  ...rest
}: ButtonProps) {
  return (
    <button
      type="button"
      {...rest}
      disabled={disabled === true || busy}
      aria-busy={busy}
      className={`${SHAPE} ${LOOKS[look]} ${className}`}
    >
      {children}
      {busy ? <span aria-hidden="true">…</span> : null}
    </button>
  );
}

/** A link that looks like a button. */
export function ButtonLink({
  look = "plain",
  className = "",
  ...rest
}: ComponentProps<typeof Link> & { look?: Look }) {
  return <Link prefetch={false} {...rest} className={`${SHAPE} ${LOOKS[look]} ${className}`} />;
}
