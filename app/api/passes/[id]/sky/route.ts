import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { passSky } from "@/lib/services/pass-sky";

/** Sun, Moon, the light on the fragment, and the protected objects near the beam of a pass. */
export const GET = handle(({ params, actor }) => passSky(actor, pathId(params, "pass")));
