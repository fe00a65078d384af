import { type ReactNode, useId } from "react";

/** What the control inside a field has to carry. Spread it: `<input {...control} name="reason" />`. */
export interface ControlProps {
  readonly id: string;
  readonly className: string;
  readonly "aria-describedby": string | undefined;
  readonly "aria-invalid": true | undefined;
}

interface FieldProps {
  readonly label: string;
  /** What is expected, with unit and range; stands under the label. */
  readonly hint?: ReactNode;
  /** Why the value was refused; stands under the control. */
  readonly error?: string | null | undefined;
  /** Gets the properties for the input, select or textarea. */
  readonly children: (control: ControlProps) => ReactNode;
}

/** A labelled control with hint and error tied to it. Use it in client components (it takes a function). */
export function Field({ label, hint, error, children }: FieldProps) {
  const id = useId();
  const described = [hint ? `${id}-hint` : null, error ? `${id}-error` : null].filter(
    (part) => part !== null,
  );
  return (
    <div className="flex flex-col gap-1">
      <label htmlFor={id} className="font-semibold">
        {label}
      </label>
      {hint ? (
        <p id={`${id}-hint`} className="text-[0.8125rem] text-quiet">
          {hint}
        </p>
      ) : null}
      {children({
        id,
        className: "control",
        "aria-describedby": described.length > 0 ? described.join(" ") : undefined,
        "aria-invalid": error ? true : undefined,
      })}
      {error ? (
        <p id={`${id}-error`} className="text-sm text-dwell">
          {error}
        </p>
      ) : null}
    </div>
  );
}

/** The reason for one field out of a FetchError's details, or null. */
export function errorOf(details: readonly { path: string; message: string }[], path: string): string | null {
  const own = details.filter((d) => d.path === path).map((d) => d.message);
  return own.length > 0 ? own.join("; ") : null;
}
