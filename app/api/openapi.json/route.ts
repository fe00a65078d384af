import { handlePublic } from "@/app/_server/handle";
import { config } from "@/lib/config";
import { openApiDocument } from "@/lib/contracts/openapi";

/** The API's own description, OpenAPI 3.1. */
export const GET = handlePublic(async () => openApiDocument(config().DWELLBOOK_BASE_URL));
