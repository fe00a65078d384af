import { SMTPServer } from "smtp-server";

const largestBytes = 10_000_000;

/**
 * The receiving side: takes every mail from this machine and gives it to the store. It answers "accepted" only after
 * the store has it on disk.
 * @param {{ add: (raw: Buffer, envelope: { from: string, to: string[] }, nowMs: number) => Promise<unknown> }} store
 */
export function createSmtpServer(store) {
  return new SMTPServer({
    banner: "Dwellbook mail fake",
    disabledCommands: ["STARTTLS", "AUTH"],
    authOptional: true,
    disableReverseLookup: true,
    size: largestBytes,
    logger: false,
    onData(stream, session, done) {
      const chunks = [];
      let bytes = 0;
      stream.on("data", (chunk) => {
        bytes += chunk.length;
        if (bytes <= largestBytes) chunks.push(chunk);
      });
      stream.on("error", done);
      stream.on("end", () => {
        if (bytes > largestBytes) {
          done(Object.assign(new Error("This mail is larger than 10 MB"), { responseCode: 552 }));
          return;
        }
        const from = session.envelope.mailFrom ? session.envelope.mailFrom.address : "";
        const to = session.envelope.rcptTo.map((one) => one.address);
        store.add(Buffer.concat(chunks), { from, to }, Date.now()).then(
          () => done(null, "kept; it goes nowhere"),
          (error) => done(Object.assign(new Error(`Not kept: ${error.message}`), { responseCode: 451 })),
        );
      });
    },
  });
}
