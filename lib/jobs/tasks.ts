import type { Task } from "./task";
import { keepWeekFilledTask } from "./tasks/keep-week-filled";
import { pruneWorkersTask } from "./tasks/prune-workers";

/** Every kind of job that a worker knows. */
export const TASKS: readonly Task[] = [keepWeekFilledTask, pruneWorkersTask];
