import { describe, expect, test } from "vitest";
import { rejectedLines } from "@/app/_components/import-sets/rejected-lines";

const refused = (line: number, column = 1) => ({ line, column, message: "wrong" });
const text = ["QL-1", "1 first", "2 second", "1 third", "2 fourth", "", "{ json }"].join("\r\n");

describe("refused lines", () => {
  test("keep a two-line set whole with its name, whichever line was refused", () => {
    const whole = "QL-1\n1 first\n2 second";
    expect(rejectedLines({ rejected: [refused(3, 69)] }, text)).toBe(`# line 3, column 69: wrong\n${whole}`);
    expect(rejectedLines({ rejected: [refused(2)] }, text)).toBe(`# line 2, column 1: wrong\n${whole}`);
  });

  test("take no line of a neighbouring set for a name", () => {
    expect(rejectedLines({ rejected: [refused(5)] }, text)).toBe(
      "# line 5, column 1: wrong\n1 third\n2 fourth",
    );
  });

  test("keep other lines alone, and say nothing of lines that are not there", () => {
    expect(rejectedLines({ rejected: [refused(7), refused(99)] }, text)).toBe(
      "# line 7, column 1: wrong\n{ json }\n# line 99, column 1: wrong\n",
    );
    expect(rejectedLines({ rejected: [] }, text)).toBe("");
  });
});
