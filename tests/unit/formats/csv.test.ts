import { describe, expect, it } from "vitest";
import { writeCsv } from "@/lib/formats/csv";

describe("CSV", () => {
  it("follows RFC 4180", () => {
    expect(
      writeCsv([
        ["station", "energy J"],
        ["Ridge, north", 7300],
        ['the "old" one', null],
      ]),
    ).toBe('station,energy J\r\n"Ridge, north",7300\r\n"the ""old"" one",\r\n');
    expect(writeCsv([["a\r\nb", "c\nd", true, " e "]])).toBe('"a\r\nb","c\nd",true," e "\r\n');
    expect(writeCsv([])).toBe("");
  });

  it.each(["=1+1", "+cmd", "-2+3", "@SUM(A1)", "\t=1", "\r=1", "\n=1", "  =1", "＝1+1", "=", "-", "-1-1"])(
    "makes a formula harmless: %j",
    (text) => {
      const [line = ""] = writeCsv([[text, "end"]]).split(",end\r\n");
      expect(line.replace(/^"/, "").startsWith("'")).toBe(true);
      expect(line.replaceAll('"', "").slice(1)).toBe(text);
    },
  );

  it("keeps numbers as numbers, also as text", () => {
    expect(writeCsv([[-12.5, "-12.5", "+3", "-1e-5", 0, 1e21, "-.5"]])).toBe(
      "-12.5,-12.5,+3,-1e-5,0,1e+21,-.5\r\n",
    );
  });

  it("leaves ordinary text and times as they are", () => {
    const time = "2031-04-06T03:12:45.000Z";
    expect(writeCsv([[time, "a=b", "e-mail@example.org", "", "Ä"]])).toBe(
      `${time},a=b,e-mail@example.org,,Ä\r\n`,
    );
  });

  it("drops NUL and refuses numbers that are none", () => {
    expect(writeCsv([["a\0b"]])).toBe("ab\r\n");
    expect(() => writeCsv([[Number.NaN]])).toThrow(RangeError);
    expect(() => writeCsv([[Number.POSITIVE_INFINITY]])).toThrow(RangeError);
  });
});
