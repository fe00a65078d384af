import { posix } from "node:path";
import ts from "typescript";
import type { SourceFile } from "./project-files";

/** One import as it is written, and what it names: a path from the root, or a package. */
export interface Import {
  readonly specifier: string;
  readonly target: string;
  readonly isPackage: boolean;
  readonly line: number;
}

/** Parses a file; types are not looked at. */
export function parse(file: SourceFile): ts.SourceFile {
  return ts.createSourceFile(file.path, file.text, ts.ScriptTarget.Latest, true);
}

/** Visits every node of a file. */
export function walk(node: ts.Node, visit: (node: ts.Node) => void): void {
  visit(node);
  node.forEachChild((child) => walk(child, visit));
}

/** Every import of a file: static, of types, by re-export, dynamic, by require and in type positions. */
export function importsOf(file: SourceFile): Import[] {
  const found: Import[] = [];
  const source = parse(file);
  walk(source, (node) => {
    const specifier = specifierOf(node);
    if (specifier === null) return;
    const line = source.getLineAndCharacterOfPosition(node.getStart(source)).line + 1;
    found.push({ specifier, line, ...resolve(file.path, specifier) });
  });
  return found;
}

function specifierOf(node: ts.Node): string | null {
  if (ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) return textOf(node.moduleSpecifier);
  if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) return textOf(node.argument.literal);
  if (ts.isExternalModuleReference(node)) return textOf(node.expression);
  if (!ts.isCallExpression(node)) return null;
  const callee = node.expression;
  const loads =
    callee.kind === ts.SyntaxKind.ImportKeyword || (ts.isIdentifier(callee) && callee.text === "require");
  return loads ? textOf(node.arguments[0]) : null;
}

function textOf(node: ts.Node | undefined): string | null {
  return node && ts.isStringLiteralLike(node) ? node.text : null;
}

function resolve(from: string, specifier: string): { target: string; isPackage: boolean } {
  if (specifier.startsWith("@/")) return { target: posix.normalize(specifier.slice(2)), isPackage: false };
  if (specifier.startsWith(".")) {
    return { target: posix.normalize(posix.join(posix.dirname(from), specifier)), isPackage: false };
  }
  const [first = "", second = ""] = specifier.split("/");
  return { target: first.startsWith("@") ? `${first}/${second}` : first, isPackage: true };
}
