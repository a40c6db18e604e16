/** Every number that a module of src/ gives to others or takes from them, by the TypeScript compiler: names and where they stand. */
import { relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';

/** A parameter, field, constant or result that is a number or holds numbers. */
export interface ExportedNumber {
  name: string;
  /** File under src/, `design/margins.ts`. */
  file: string;
  /** `parameter of f`, `result of f`, `field of T`, `constant`. */
  place: string;
}

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const SOURCES = `${ROOT}src/`;
const NUMBER_ARRAYS = new Set(['Float64Array', 'Float32Array', 'Int32Array', 'Int16Array']);

function program(): ts.Program {
  const host = { ...ts.sys, onUnRecoverableConfigFileDiagnostic: () => undefined };
  const config = ts.getParsedCommandLineOfConfigFile(`${ROOT}tsconfig.json`, {}, host);
  const files = config?.fileNames.filter((file) => file.startsWith(SOURCES)) ?? [];
  return ts.createProgram(files, config?.options ?? {});
}

function isPrivate(node: ts.Node): boolean {
  const modifiers = ts.canHaveModifiers(node) ? (ts.getModifiers(node) ?? []) : [];
  return modifiers.some(({ kind }) => kind === ts.SyntaxKind.PrivateKeyword);
}

class Collector {
  readonly found: ExportedNumber[] = [];

  constructor(
    private readonly checker: ts.TypeChecker,
    private readonly file: string,
  ) {}

  declaration(name: string, node: ts.Node): void {
    if (ts.isFunctionDeclaration(node)) this.signature(name, node);
    else if (ts.isInterfaceDeclaration(node) || ts.isClassDeclaration(node)) this.members(name, node.members);
    else if (ts.isTypeAliasDeclaration(node)) this.typeNode(name, node.type);
    else if (ts.isVariableDeclaration(node)) {
      if (node.initializer && ts.isArrowFunction(node.initializer)) this.signature(name, node.initializer);
      else this.add(name, this.checker.getTypeAtLocation(node), 'constant');
    }
  }

  private signature(name: string, node: ts.SignatureDeclaration): void {
    for (const parameter of node.parameters) {
      const type = this.checker.getTypeAtLocation(parameter);
      if (ts.isIdentifier(parameter.name)) this.add(parameter.name.text, type, `parameter of ${name}`);
      this.typeNode(name, parameter.type);
    }
    if (ts.isConstructorDeclaration(node)) return;
    const signature = this.checker.getSignatureFromDeclaration(node);
    if (signature) this.add(name, signature.getReturnType(), `result of ${name}`);
    this.typeNode(name, node.type);
  }

  private typeNode(name: string, node: ts.TypeNode | undefined): void {
    if (!node) return;
    if (ts.isTypeLiteralNode(node)) this.members(name, node.members);
    else ts.forEachChild(node, (child) => (ts.isTypeNode(child) ? this.typeNode(name, child) : undefined));
  }

  private members(owner: string, members: readonly ts.Node[]): void {
    for (const member of members) {
      if (isPrivate(member)) continue;
      if (ts.isConstructorDeclaration(member)) this.signature(owner, member);
      else if (ts.isMethodDeclaration(member) || ts.isMethodSignature(member))
        this.signature(member.name.getText(), member);
      else if (
        ts.isPropertySignature(member) ||
        ts.isPropertyDeclaration(member) ||
        ts.isGetAccessor(member)
      ) {
        const type = this.checker.getTypeAtLocation(member);
        this.add(member.name.getText(), type, `field of ${owner}`);
        this.typeNode(`${owner}.${member.name.getText()}`, member.type);
      }
    }
  }

  private add(name: string, type: ts.Type, place: string): void {
    if (!this.holdsNumbers(type)) return;
    this.found.push({ name, file: this.file, place });
  }

  private holdsNumbers(type: ts.Type): boolean {
    if (type.isUnion())
      return (
        !type.types.every((each) => each.isLiteral()) && type.types.some((each) => this.holdsNumbers(each))
      );
    if (type.flags & ts.TypeFlags.NumberLike) return true;
    if (NUMBER_ARRAYS.has(this.checker.typeToString(type).split('<')[0]!)) return true;
    if (!this.checker.isArrayType(type) && !this.checker.isTupleType(type)) return false;
    return this.checker.getTypeArguments(type as ts.TypeReference).some((each) => this.holdsNumbers(each));
  }
}

export function exportedNumbers(): ExportedNumber[] {
  const compiled = program();
  const checker = compiled.getTypeChecker();
  return compiled.getSourceFiles().flatMap((source) => {
    if (!source.fileName.startsWith(SOURCES)) return [];
    const module = checker.getSymbolAtLocation(source);
    const collector = new Collector(checker, relative(SOURCES, source.fileName));
    for (const symbol of module ? checker.getExportsOfModule(module) : [])
      for (const node of symbol.declarations ?? [])
        if (node.getSourceFile() === source) collector.declaration(symbol.name, node);
    return collector.found;
  });
}
