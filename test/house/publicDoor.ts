// The public door as the compiler sees it: every export of the library's three doors with its type and its documentation.

import { resolve } from "node:path";
import ts from "typescript";

/** One export of the library. */
export interface PublicName {
  readonly door: string;
  readonly name: string;
  readonly file: string;
  readonly kind: "function" | "type" | "value";
  readonly text: string;
  readonly tags: ReadonlyMap<string, string>;
  /** Names of numeric fields among its parameters, results or members, with where each stands. */
  readonly numericFields: readonly string[];
}

const doors = ["lib/index.ts", "lib/files.ts", "lib/notebook/index.ts"];

/** Reads the three doors. */
export function publicNames(): PublicName[] {
  const config = ts.getParsedCommandLineOfConfigFile(
    "lib/tsconfig.json",
    {},
    {
      ...ts.sys,
      onUnRecoverableConfigFileDiagnostic: (diagnostic) => {
        throw new Error(ts.flattenDiagnosticMessageText(diagnostic.messageText, "\n"));
      },
    },
  )!;
  const program = ts.createProgram(doors, config.options);
  const checker = program.getTypeChecker();
  return doors.flatMap((door) => {
    const module = checker.getSymbolAtLocation(program.getSourceFile(door)!)!;
    return checker.getExportsOfModule(module).map((exported) => describe(door, exported, checker));
  });
}

function describe(door: string, exported: ts.Symbol, checker: ts.TypeChecker): PublicName {
  const symbol = exported.flags & ts.SymbolFlags.Alias ? checker.getAliasedSymbol(exported) : exported;
  const declaration = symbol.declarations![0]!;
  const isType = (symbol.flags & (ts.SymbolFlags.Interface | ts.SymbolFlags.TypeAlias)) !== 0;
  const kind = symbol.flags & ts.SymbolFlags.Function ? "function" : isType ? "type" : "value";
  const tags = symbol
    .getJsDocTags(checker)
    .map((tag) => [tag.name, ts.displayPartsToString(tag.text)] as const);
  return {
    door,
    name: exported.name,
    file: declaration.getSourceFile().fileName.replace(`${resolve(".")}/`, ""),
    kind,
    text: ts.displayPartsToString(symbol.getDocumentationComment(checker)),
    tags: new Map(tags),
    numericFields: kind === "value" ? [] : [...numericFieldsOf(symbol, declaration, kind, checker)],
  };
}

function numericFieldsOf(
  symbol: ts.Symbol,
  node: ts.Node,
  kind: "function" | "type",
  checker: ts.TypeChecker,
): Set<string> {
  const found = new Set<string>();
  const collect = (type: ts.Type, depth: number) => {
    for (const part of type.isUnion() ? type.types : [type]) {
      if (depth > 3 || !(part.flags & ts.TypeFlags.Object)) continue;
      const element = checker.getIndexTypeOfType(part, ts.IndexKind.Number);
      if (element !== undefined) {
        collect(element, depth + 1);
        continue;
      }
      for (const property of part.getProperties()) {
        if (
          !property.declarations?.some(
            (one) => one.getSourceFile().fileName.includes("/lib/") && !one.getSourceFile().isDeclarationFile,
          )
        )
          continue;
        const type = checker.getTypeOfSymbolAtLocation(property, node);
        if (isNumeric(type, checker)) found.add(property.name);
        else collect(type, depth + 1);
      }
    }
  };
  if (kind === "type") collect(checker.getDeclaredTypeOfSymbol(symbol), 0);
  else {
    for (const signature of checker.getTypeOfSymbolAtLocation(symbol, node).getCallSignatures()) {
      for (const parameter of signature.parameters)
        collect(checker.getTypeOfSymbolAtLocation(parameter, node), 0);
      collect(signature.getReturnType(), 0);
    }
  }
  return found;
}

/** A number, a list of numbers, or a value with its interval or source. */
function isNumeric(type: ts.Type, checker: ts.TypeChecker): boolean {
  const part = checker.getNonNullableType(type);
  if (part.flags & ts.TypeFlags.NumberLike) return true;
  const element = checker.getIndexTypeOfType(part, ts.IndexKind.Number);
  if (element !== undefined) return (element.flags & ts.TypeFlags.NumberLike) !== 0;
  return (
    part.getProperty("value") !== undefined &&
    (part.getProperty("low") !== undefined || part.getProperty("u") !== undefined)
  );
}
