import { pruneWorkers } from "@/lib/services/heartbeat";
import type { Task } from "../task";

/** Forgets workers that stopped long ago. */
export const pruneWorkersTask: Task = { name: "prune-workers", run: () => pruneWorkers() };
