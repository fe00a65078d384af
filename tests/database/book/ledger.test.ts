import { sql } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { inTransaction } from "@/db/transaction";
import { SYSTEM, writeLedger } from "@/lib/services/ledger";
import { faultOf } from "../faults";
import { ownDatabase, withClient } from "../support";

const testDatabase = ownDatabase();

describe("the ledger", () => {
  beforeAll(() =>
    inTransaction((tx) =>
      writeLedger(tx, SYSTEM, {
        action: "tested",
        subjectKind: "test",
        subjectId: null,
        subjectLabel: "a row",
      }),
    ),
  );

  const CHANGES = ["UPDATE ledger SET action = 'x'", "DELETE FROM ledger", "TRUNCATE ledger"];
  for (const change of CHANGES) {
    it(`refuses ${change.split(" ")[0]} by the application role and by the owner`, async () => {
      for (const url of [testDatabase().url, testDatabase().ownerUrl]) {
        const fault = await faultOf(withClient(url, (client) => client.query(change)));
        expect(fault?.code).toBe("42501");
      }
    });
  }

  it("still holds its row", async () => {
    const result = await database().execute(sql`select actor_name, action from ledger`);
    expect(result.rows).toEqual([{ actor_name: "the book", action: "tested" }]);
  });

  it("cannot be rid of its guard by the application role", async () => {
    const drop = withClient(testDatabase().url, (client) =>
      client.query("DROP TRIGGER ledger_append_only ON ledger"),
    );
    expect((await faultOf(drop))?.code).toBe("42501");
  });
});
