import { numberText } from "@/app/_format/figures";

/** A height change in metres or kilometres with its band; a drop is written as a negative change. */
export function HeightChange(props: { readonly dropM: number; readonly bandM: readonly [number, number] }) {
  const [least, most] = props.bandM;
  return (
    <span className="whitespace-nowrap">
      <span className="figures font-semibold">{heightText(-props.dropM)}</span>
      <span className="figures block text-[0.8125rem] text-quiet" title="P10 to P90 of the resulting height">
        {heightText(-most)} … {heightText(-least)}
      </span>
    </span>
  );
}

/** `−412 m`, `−13.4 km`, `+0.9 km`: a change always has its sign. */
export function heightText(changeM: number): string {
  const sign = changeM >= 0.5 ? "+" : "";
  if (Math.abs(changeM) < 999.5) return `${sign}${numberText(changeM)} m`;
  return `${sign}${numberText(changeM / 1000, Math.abs(changeM) < 99_950 ? 1 : 0)} km`;
}
