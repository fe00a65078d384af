import ts from "typescript";
import { PURE } from "./floors";
import { parse, walk } from "./imports-of";
import type { SourceFile } from "./project-files";

/** Files that may read the environment: the settings, the start command, tools and tests. */
const MAY_READ_ENVIRONMENT = /^(lib\/config\.ts|lib\/run\/|tests\/|[a-z]+\.config\.(mjs|ts)$)/;

/** What pure code must not touch, by the first name of the expression. */
const IMPURE_NAMES = new Set([
  "process",
  "globalThis",
  "window",
  "document",
  "fetch",
  "setTimeout",
  "setInterval",
  "setImmediate",
  "queueMicrotask",
  "performance",
  "crypto",
  "console",
  "require",
]);

/** Reads of process.env outside the places that may. */
export function environmentFaults(files: readonly SourceFile[]): string[] {
  return faultsIn(
    files.filter(({ path }) => !MAY_READ_ENVIRONMENT.test(path)),
    (node) => {
      const reads =
        (ts.isPropertyAccessExpression(node) &&
          node.name.text === "env" &&
          isNamed(node.expression, "process")) ||
        (ts.isElementAccessExpression(node) && isNamed(node.expression, "process")) ||
        (ts.isVariableDeclaration(node) &&
          node.initializer !== undefined &&
          isNamed(node.initializer, "process"));
      return reads ? "reads the environment: ask lib/config.ts" : null;
    },
  );
}

/** Clocks, chance and machines in pure rooms. */
export function impurityFaults(files: readonly SourceFile[]): string[] {
  const pure = files.filter(({ path }) => PURE.some((room) => path.startsWith(`${room}/`)));
  return faultsIn(pure, (node, ownNames) => {
    if (ts.isNewExpression(node) && isNamed(node.expression, "Date") && !node.arguments?.length)
      return "asks the clock";
    if (ts.isCallExpression(node) && isNamed(node.expression, "Date")) return "asks the clock";
    if (ts.isPropertyAccessExpression(node)) {
      if (isNamed(node.expression, "Date") && node.name.text === "now") return "asks the clock";
      if (isNamed(node.expression, "Math") && node.name.text === "random") return "leaves it to chance";
    }
    return impureNameFault(node, ownNames);
  });
}

/** Files that only pass on, and index files: imports shall name the file that they mean. */
export function barrelFaults(files: readonly SourceFile[]): string[] {
  return files.flatMap((file) => {
    const { statements } = parse(file);
    const passedOn = statements.filter((s) => ts.isExportDeclaration(s) && s.moduleSpecifier !== undefined);
    if (/(^|\/)index\.[a-z]+$/.test(file.path)) return [`${file.path} is an index file`];
    if (passedOn.some((s) => ts.isExportDeclaration(s) && s.exportClause === undefined))
      return [`${file.path} exports everything of another`];
    return statements.length > 0 && passedOn.length === statements.length
      ? [`${file.path} only passes on`]
      : [];
  });
}

/** Files of the product longer than 250 lines; tests may tell longer stories. */
export function lengthFaults(files: readonly SourceFile[]): string[] {
  return files.flatMap(({ path, text }) => {
    if (path.startsWith("tests/")) return [];
    const lines = text.split("\n").length - 1;
    return lines > 250 ? [`${path} has ${lines} lines`] : [];
  });
}

/** A file that declares such a name itself means its own. */
function impureNameFault(node: ts.Node, ownNames: ReadonlySet<string>): string | null {
  if (!ts.isIdentifier(node) || !IMPURE_NAMES.has(node.text) || ownNames.has(node.text)) return null;
  const parent = node.parent;
  // The name of a property or a parameter is no use of the global.
  const isProperty =
    (ts.isPropertyAccessExpression(parent) && parent.name === node) ||
    (ts.isPropertyAssignment(parent) && parent.name === node) ||
    (ts.isPropertySignature(parent) && parent.name === node);
  return isProperty ? null : `uses ${node.text}`;
}

function isNamed(node: ts.Node, name: string): boolean {
  return ts.isIdentifier(node) && node.text === name;
}

type Judge = (node: ts.Node, ownNames: ReadonlySet<string>) => string | null;

function faultsIn(files: readonly SourceFile[], judge: Judge): string[] {
  return files.flatMap((file) => {
    const source = parse(file);
    const ownNames = namesDeclaredIn(source);
    const faults: string[] = [];
    walk(source, (node) => {
      const words = judge(node, ownNames);
      if (words === null) return;
      faults.push(
        `${file.path}:${source.getLineAndCharacterOfPosition(node.getStart(source)).line + 1} ${words}`,
      );
    });
    return faults;
  });
}

function namesDeclaredIn(source: ts.SourceFile): Set<string> {
  const names = new Set<string>();
  walk(source, (node) => {
    const declares =
      ts.isVariableDeclaration(node) ||
      ts.isParameter(node) ||
      ts.isFunctionDeclaration(node) ||
      ts.isBindingElement(node);
    if (declares && node.name && ts.isIdentifier(node.name)) names.add(node.name.text);
  });
  return names;
}
