import ts from 'typescript';

/** One mention of another module in a file. */
export interface Import {
  readonly from: string;
  /** As written: `./beside`, `@common/time/span`, `node:fs`, `luxon`. */
  readonly specifier: string;
  /** The project's file behind it; undefined for packages. */
  readonly target: string | undefined;
  /** A type alone leaves nothing behind at run time. */
  readonly kind: 'type' | 'value';
}

/** A relative or aliased import that leads to no file. */
export class LostImport extends Error {}

const ALIASES: ReadonlyMap<string, string> = new Map([
  ['@common/', 'common/'],
  ['@database/', 'database/'],
]);

/** Every import of every file, resolved among those files. */
export function readImports(files: readonly string[], read: (path: string) => string): readonly Import[] {
  const known = new Set(files);
  return files.flatMap((from) =>
    mentions(from, read(from)).map((mention) => ({
      ...mention,
      from,
      target: resolve(from, mention.specifier, known),
    })),
  );
}

type Mention = Pick<Import, 'specifier' | 'kind'>;

function mentions(path: string, text: string): readonly Mention[] {
  const found: Mention[] = [];
  const note = (node: ts.Node | undefined, kind: Import['kind']): void => {
    if (node !== undefined && ts.isStringLiteralLike(node)) found.push({ specifier: node.text, kind });
  };
  const visit = (node: ts.Node): void => {
    if (ts.isImportDeclaration(node)) note(node.moduleSpecifier, importsOnlyTypes(node) ? 'type' : 'value');
    else if (ts.isExportDeclaration(node)) note(node.moduleSpecifier, node.isTypeOnly ? 'type' : 'value');
    else if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) note(node.argument.literal, 'type');
    else if (ts.isCallExpression(node) && loadsModule(node)) note(node.arguments[0], 'value');
    else if (ts.isNewExpression(node)) note(workerUrl(node), 'value');
    ts.forEachChild(node, visit);
  };
  visit(ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true));
  return found;
}

function importsOnlyTypes({ importClause }: ts.ImportDeclaration): boolean {
  if (importClause === undefined) return false;
  if (importClause.phaseModifier === ts.SyntaxKind.TypeKeyword) return true;
  const { name, namedBindings } = importClause;
  return (
    name === undefined &&
    namedBindings !== undefined &&
    ts.isNamedImports(namedBindings) &&
    namedBindings.elements.length > 0 &&
    namedBindings.elements.every((element) => element.isTypeOnly)
  );
}

function loadsModule(call: ts.CallExpression): boolean {
  return (
    call.expression.kind === ts.SyntaxKind.ImportKeyword ||
    (ts.isIdentifier(call.expression) && call.expression.text === 'require')
  );
}

/** The address in `new URL('./x.worker', import.meta.url)`, by which a web worker is found. */
function workerUrl(node: ts.NewExpression): ts.Node | undefined {
  const [address, base] = node.arguments ?? [];
  const isUrl = ts.isIdentifier(node.expression) && node.expression.text === 'URL';
  return isUrl && base?.getText() === 'import.meta.url' ? address : undefined;
}

function resolve(from: string, specifier: string, known: ReadonlySet<string>): string | undefined {
  const base = projectPath(from, specifier);
  // A path into node_modules names a package, only with more letters.
  if (base === undefined || base.startsWith('node_modules/')) return undefined;
  const candidates = [base, `${base}.ts`, `${base}/index.ts`, base.replace(/\.js$/, '.ts')];
  const target = candidates.find((candidate) => known.has(candidate));
  if (target === undefined && !/\.(json|html|scss|css|svg)$/.test(base)) {
    throw new LostImport(`${from} imports ${specifier}, which is no file of the project.`);
  }
  return target;
}

function projectPath(from: string, specifier: string): string | undefined {
  for (const [alias, folder] of ALIASES) {
    if (specifier.startsWith(alias)) return folder + specifier.slice(alias.length);
  }
  if (!specifier.startsWith('.')) return undefined;
  const parts = from.split('/').slice(0, -1);
  for (const part of specifier.split('/')) {
    if (part === '..') parts.pop();
    else if (part !== '.' && part !== '') parts.push(part);
  }
  return parts.join('/');
}
