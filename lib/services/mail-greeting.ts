import { connect, type Socket } from "node:net";
import { connect as connectTls } from "node:tls";

/**
 * True when the mail server greets with 220 within `limitMs`. Nothing is sent but QUIT. The address is a
 * smtp: or smtps: URL; a name that doesn't resolve, a refusal and silence are all false.
 */
export function greetsMail(smtpUrl: string, limitMs: number): Promise<boolean> {
  const url = URL.canParse(smtpUrl) ? new URL(smtpUrl) : null;
  if (!url) return Promise.resolve(false);
  const secure = url.protocol === "smtps:";
  const port = Number(url.port) || (secure ? 465 : 587);
  const host = url.hostname.replace(/^\[|\]$/g, "");
  return firstLineIs220(
    () => (secure ? connectTls({ host, port, servername: host }) : connect(port, host)),
    limitMs,
  );
}

function firstLineIs220(open: () => Socket, limitMs: number): Promise<boolean> {
  return new Promise((resolve) => {
    const socket = open();
    let heard = "";
    const end = (greeted: boolean) => {
      clearTimeout(timer);
      socket.removeAllListeners();
      // A late error on a socket that nobody listens to any more would end the process.
      socket.on("error", () => undefined);
      if (greeted) socket.setTimeout(limitMs, () => socket.destroy()).end("QUIT\r\n");
      else socket.destroy();
      resolve(greeted);
    };
    const timer = setTimeout(() => end(false), limitMs);
    socket.on("error", () => end(false));
    socket.on("close", () => end(false));
    socket.on("data", (bytes) => {
      heard += bytes.toString("latin1");
      if (heard.length >= 3) end(heard.startsWith("220"));
    });
  });
}
