import { z } from "zod";
import { CALCULATIONS, type CalculationName, isCalculation } from "@/lib/services/calculate-work";

const question = z.object({
  id: z.number(),
  name: z.custom<CalculationName>(isCalculation),
  input: z.unknown(),
});

/**
 * A process that calculates for a web process, so that the web server goes on answering meanwhile. It
 * takes one question after another from its parent and ends with it.
 */
process.on("message", (message: unknown) => {
  const { id, name, input } = question.parse(message);
  const calculate = CALCULATIONS[name] as (input: unknown) => unknown;
  try {
    process.send?.({ id, ok: true, result: calculate(input) });
  } catch (error) {
    process.send?.({ id, ok: false, message: error instanceof Error ? error.message : String(error) });
  }
});
process.on("disconnect", () => process.exit(0));

// A terminal sends its signals to the whole group; the parent decides when this process ends.
process.on("SIGINT", () => undefined);
process.on("SIGHUP", () => undefined);
