import { handlePublic } from "@/app/_server/handle";
import { readHealth } from "@/lib/services/health";

/** 200 when everything that the product needs answers, else 503; the body says what. */
export const GET = handlePublic(async () => {
  const health = await readHealth();
  return Response.json(health, { status: health.status === "ok" ? 200 : 503 });
});
