import ts from "typescript";

export interface FileImports {
  /** Module specifiers, type imports and workers' addresses included. */
  specifiers: string[];
  /** True when the file does nothing but export on what others hold. */
  isBarrel: boolean;
}

/** The code of a file: all of it, or an Astro component's frontmatter and scripts. */
function codeOf(path: string, text: string): string {
  if (!path.endsWith(".astro")) return text;
  const frontmatter = /^\s*---\r?\n([\s\S]*?)\r?\n---/.exec(text)?.[1] ?? "";
  const scripts = [...text.matchAll(/<script\b[^>]*>([\s\S]*?)<\/script>/g)].map(([, code = ""]) => code);
  return [frontmatter, ...scripts].join("\n");
}

/** Reads what a file imports with TypeScript's parser. */
export function importsOf(path: string, text: string): FileImports {
  const source = ts.createSourceFile(
    path,
    codeOf(path, text),
    ts.ScriptTarget.Latest,
    true,
    path.endsWith(".ts") ? ts.ScriptKind.TS : ts.ScriptKind.TSX,
  );
  const specifiers: string[] = [];
  let reexports = false;
  const visit = (node: ts.Node): void => {
    const specifier = specifierOf(node);
    if (specifier !== undefined) {
      specifiers.push(specifier);
      if (ts.isExportDeclaration(node)) reexports = true;
    }
    ts.forEachChild(node, visit);
  };
  visit(source);
  const statements = source.statements.filter((statement) => !ts.isEmptyStatement(statement));
  const onlyReexports =
    statements.length > 0 &&
    statements.every((statement) => ts.isExportDeclaration(statement) && statement.moduleSpecifier);
  const isIndex = /(^|\/)index\.tsx?$/.test(path);
  return { specifiers, isBarrel: onlyReexports || (isIndex && reexports) };
}

function specifierOf(node: ts.Node): string | undefined {
  if (ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) return literal(node.moduleSpecifier);
  if (ts.isImportTypeNode(node)) {
    return ts.isLiteralTypeNode(node.argument) ? literal(node.argument.literal) : undefined;
  }
  if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) {
    return literal(node.arguments[0]);
  }
  // new URL("./worker.ts", import.meta.url): how a bundler finds a worker.
  if (ts.isNewExpression(node) && node.expression.getText() === "URL") {
    const [address, base] = node.arguments ?? [];
    return base?.getText() === "import.meta.url" && /\.tsx?$/.test(literal(address) ?? "")
      ? literal(address)
      : undefined;
  }
  return undefined;
}

const literal = (node: ts.Node | undefined): string | undefined =>
  node && ts.isStringLiteralLike(node) ? node.text : undefined;
