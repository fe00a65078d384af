import { createServer } from "node:net";
import { Problem } from "./words.mjs";

/**
 * Tries to listen on a loopback port.
 * @param {number} port 0 for any
 * @returns {Promise<{ port: number } | { code: string }>} the port that was free, or why it was not
 */
export function tryPort(port) {
  return new Promise((done) => {
    const server = createServer();
    server.once("error", (error) => done({ code: error.code ?? "EUNKNOWN" }));
    server.listen({ port, host: "127.0.0.1", exclusive: true }, () => {
      const taken = server.address().port;
      server.close(() => done({ port: taken }));
    });
  });
}

/**
 * A free loopback port, the preferred one if it is still free.
 * @param {number} [preferred]
 * @returns {Promise<number>}
 */
export async function freePort(preferred) {
  for (const candidate of preferred ? [preferred, 0] : [0]) {
    const answer = await tryPort(candidate);
    if ("port" in answer) return answer.port;
  }
  throw new Problem("No port is free on the loopback interface.");
}

/**
 * Reads PORT.
 * @param {string | undefined} text
 * @returns {number | null} null when it is not set
 */
export function readPort(text) {
  if (text === undefined || text.trim() === "") return null;
  const port = Number(text);
  if (!/^\d+$/.test(text.trim()) || port < 1 || port > 65_535) {
    throw new Problem(`PORT must be a whole number from 1 to 65535, not "${text}".`);
  }
  return port;
}

/**
 * Chooses the port of the web server: the asked one or nothing, else 3000 or the next free one after it.
 * @param {number | null} asked
 * @param {(port: number) => Promise<{ port: number } | { code: string }>} attempt
 * @returns {Promise<{ port: number, insteadOf: number | null }>}
 */
export async function chooseWebPort(asked, attempt = tryPort) {
  if (asked !== null) {
    const answer = await attempt(asked);
    if ("port" in answer) return { port: asked, insteadOf: null };
    if (answer.code === "EACCES") throw new Problem(`Port ${asked} needs rights that this account lacks.`);
    throw new Problem(`Port ${asked} is taken by another program. Set PORT to a free one.`);
  }
  for (let port = 3000; port < 3100; port += 1) {
    const answer = await attempt(port);
    if ("port" in answer) return { port, insteadOf: port === 3000 ? null : 3000 };
  }
  throw new Problem("Ports 3000 to 3099 are all taken. Set PORT to a free one.");
}
