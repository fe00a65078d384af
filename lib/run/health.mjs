import { waitUntil } from "./processes.mjs";

/**
 * Reads an answer of /api/health.
 * @param {number} status
 * @param {string} body
 * @returns {{ ok: boolean, words: string }} words say what is missing, as far as the answer tells
 */
export function readHealth(status, body) {
  if (status === 200) return { ok: true, words: "ok" };
  const words = body.replace(/\s+/g, " ").trim().slice(0, 400);
  return { ok: false, words: `it answers ${status}${words === "" ? "" : `: ${words}`}` };
}

async function askHealth(address) {
  try {
    const answer = await fetch(`${address}/api/health`, { signal: AbortSignal.timeout(5_000) });
    return readHealth(answer.status, await answer.text());
  } catch {
    return { ok: false, words: "it does not answer yet" };
  }
}

/**
 * Waits until the product says that all of it works.
 * @param {string} address
 * @param {number} limitMs
 * @param {() => boolean} [given] a reason to stop waiting
 * @returns {Promise<{ ok: boolean, words: string }>} the last answer
 */
export async function waitForHealth(address, limitMs, given = () => false) {
  let last = { ok: false, words: "it was not asked" };
  await waitUntil(
    async () => {
      last = await askHealth(address);
      return last.ok || given();
    },
    limitMs,
    200,
  );
  return last;
}
