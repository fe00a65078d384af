import { keepWeekFilled } from "@/lib/services/start-sweep";
import type { Task } from "../task";

/** Sweeps again when the end of the last sweep has come nearer than the week that planners see. */
export const keepWeekFilledTask: Task = {
  name: "keep-week-filled",
  run: async () => {
    await keepWeekFilled(Date.now());
  },
};
