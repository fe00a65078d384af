import { describe, expect, it } from "vitest";
import { answerInput } from "@/lib/contracts/answers";
import { bookInput, confirmInput, engagementQuery, fireInput, scrubInput } from "@/lib/contracts/engagements";
import { Refusal } from "@/lib/engagement/refusal";
import { readInput, readQuery } from "@/lib/services/read-input";

function refusalOf(work: () => unknown): { status: number; paths: string[] } {
  try {
    work();
  } catch (error) {
    if (error instanceof Refusal)
      return { status: error.status, paths: error.reasons.map(({ path }) => path) };
    throw error;
  }
  throw new Error("it was taken");
}

const PASS = "3f2b8c1e-9a47-4d56-8e0f-0123456789ab";
const BOOK = { passId: PASS, from: "2031-04-06T03:12:45.000Z", to: "2031-04-06T03:14:45Z" };

describe("reading what a caller sent", () => {
  it("takes what is whole", () => {
    expect(readInput(bookInput, BOOK)).toEqual(BOOK);
  });

  it("calls a wrong type, a wrong format and an unknown field unreadable", () => {
    expect(refusalOf(() => readInput(bookInput, { ...BOOK, from: 5 })).status).toBe(400);
    expect(refusalOf(() => readInput(bookInput, { ...BOOK, from: "2031-04-06 03:12" })).status).toBe(400);
    expect(refusalOf(() => readInput(bookInput, { ...BOOK, passId: "E-1042" })).status).toBe(400);
    expect(refusalOf(() => readInput(bookInput, { ...BOOK, force: true })).status).toBe(400);
    expect(refusalOf(() => readInput(bookInput, "hello")).status).toBe(400);
    expect(refusalOf(() => readInput(bookInput, null)).status).toBe(400);
    expect(refusalOf(() => readInput(answerInput, { outcome: "perhaps" })).status).toBe(400);
    expect(refusalOf(() => readInput(scrubInput, { reason: 7 })).status).toBe(400);
  });

  it("refuses what is readable but lacks something, and names each field", () => {
    expect(refusalOf(() => readInput(bookInput, {}))).toEqual({
      status: 422,
      paths: ["passId", "from", "to"],
    });
    expect(refusalOf(() => readInput(scrubInput, {}))).toEqual({ status: 422, paths: ["reason"] });
    expect(refusalOf(() => readInput(scrubInput, { reason: "  " }))).toEqual({
      status: 422,
      paths: ["reason"],
    });
    expect(refusalOf(() => readInput(answerInput, { outcome: "objection" }))).toEqual({
      status: 422,
      paths: ["reasons"],
    });
    expect(refusalOf(() => readInput(fireInput, {})).status).toBe(422);
  });

  it("refuses a checklist that says no, or a clock that is far off, as readable", () => {
    const checklist = {
      airUnitCalledAt: BOOK.from,
      spotterInPlace: false,
      interlockTestedAt: BOOK.from,
      clockOffsetMs: 5000,
      weather: "",
      crewedListCheckedAt: null,
    };
    expect(refusalOf(() => readInput(confirmInput, { checklist }))).toEqual({
      status: 422,
      paths: [
        "checklist.spotterInPlace",
        "checklist.clockOffsetMs",
        "checklist.weather",
        "checklist.crewedListCheckedAt",
      ],
    });
    const mixed = { ...checklist, clockOffsetMs: "5" };
    expect(refusalOf(() => readInput(confirmInput, { checklist: mixed })).status).toBe(400);
  });

  it("calls any fault in a query unreadable", () => {
    expect(refusalOf(() => readQuery(engagementQuery, { from: "yesterday" })).status).toBe(400);
    expect(refusalOf(() => readQuery(engagementQuery, { colour: "red" })).status).toBe(400);
  });
});
