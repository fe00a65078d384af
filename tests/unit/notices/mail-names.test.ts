import { describe, expect, it } from "vitest";
import { mailDomain, messageIdOf, readMailbox } from "@/lib/notices/mail-names";

describe("mail names", () => {
  it("reads a mailbox with and without a name", () => {
    expect(readMailbox("Dwellbook <book@dwellbook.invalid>")).toEqual({
      name: "Dwellbook",
      email: "book@dwellbook.invalid",
    });
    expect(readMailbox('"Night Desk" <a@b.invalid>')).toEqual({ name: "Night Desk", email: "a@b.invalid" });
    expect(readMailbox("a@b.invalid")).toEqual({ name: "a@b.invalid", email: "a@b.invalid" });
  });

  it("takes the host of the product's address only when it is a name", () => {
    expect(mailDomain("https://book.example.org/x")).toBe("book.example.org");
    for (const url of ["http://127.0.0.1:3000", "http://localhost:3000", "http://[::1]:3000", "nonsense"]) {
      expect(mailDomain(url)).toBe("dwellbook.invalid");
    }
    expect(messageIdOf("n-1", "https://book.example.org")).toBe("<n-1@book.example.org>");
  });
});
