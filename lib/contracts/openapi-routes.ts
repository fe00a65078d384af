import { BOOK } from "./openapi-book";
import { CALCULATIONS, PASSES } from "./openapi-passes";
import { PEOPLE } from "./openapi-people";
import { RECORDS } from "./openapi-records";
import type { ApiRoute } from "./openapi-route";

/** Every operation of the API but the session handler's own under /api/auth. */
export const API_ROUTES: readonly ApiRoute[] = [...CALCULATIONS, ...RECORDS, ...PASSES, ...BOOK, ...PEOPLE];
