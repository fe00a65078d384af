import type { Task } from "./task";
import { keepWeekFilledTask } from "./tasks/keep-week-filled";
import { lapseEngagementsTask } from "./tasks/lapse-engagements";
import { pruneWorkersTask } from "./tasks/prune-workers";
import { rescreenEngagementTask } from "./tasks/rescreen-engagement";
import { screenAfterDwellTask } from "./tasks/screen-after-dwell";
import { sendNoticeTask } from "./tasks/send-notice";
import { sweepChunkTask } from "./tasks/sweep-chunk";

/** Every kind of job that a worker knows. */
export const TASKS: readonly Task[] = [
  sweepChunkTask,
  keepWeekFilledTask,
  pruneWorkersTask,
  sendNoticeTask,
  lapseEngagementsTask,
  rescreenEngagementTask,
  screenAfterDwellTask,
];
