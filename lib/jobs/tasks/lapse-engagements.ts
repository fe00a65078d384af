import { lapseEngagements } from "@/lib/services/lapse-engagements";
import type { Task } from "../task";

/** Each minute: ends what nobody answered or confirmed in time. */
export const lapseEngagementsTask: Task = {
  name: "lapse-engagements",
  run: async () => {
    await lapseEngagements(Date.now());
  },
};
