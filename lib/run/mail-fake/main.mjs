// The demo's mail fake: takes every mail by SMTP on the loopback interface, keeps it on disk and shows it on a page.
import { join } from "node:path";
import { dataDirOf } from "../folders.mjs";
import { createMailPages } from "./http.mjs";
import { createSmtpServer } from "./smtp.mjs";
import { openStore } from "./store.mjs";

const smtpPort = Number(process.env.MAIL_SMTP_PORT);
const pagePort = Number(process.env.MAIL_PAGE_PORT);

const store = await openStore(join(dataDirOf(), "mail"));
const smtp = createSmtpServer(store);
const pages = createMailPages(store, process.env.DWELLBOOK_BASE_URL);

function stumble(error) {
  console.error(error);
  process.exit(1);
}

smtp.server.on("error", stumble);
// What a single connection does wrong ends that connection, not the fake.
smtp.on("error", (error) => console.error(`SMTP connection: ${error.message}`));
pages.on("error", stumble);
smtp.listen(smtpPort, "127.0.0.1");
pages.listen(pagePort, "127.0.0.1", () => console.log(`SMTP on ${smtpPort}, pages on ${pagePort}`));

for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(signal, () => process.exit(0));
