import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { dirname, join, relative } from 'node:path';
import ts from 'typescript';
import { projectDirectory } from '#scripts/setup.mjs';

export interface SourceFile {
  /** Path from the project's root. */
  readonly path: string;
  readonly text: string;
}
export interface ImportUse {
  readonly from: string;
  readonly line: number;
  readonly specifier: string;
  /** Path from the root for files of the project, else null. */
  readonly target: string | null;
}

/** Every source file that git knows or would add. */
export function sourceFiles(): SourceFile[] {
  const listed = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard'], {
    cwd: projectDirectory,
    encoding: 'utf8',
  });
  return listed
    .split('\n')
    .filter(
      (path) =>
        /\.(ts|mts|vue)$/.test(path) &&
        !path.startsWith('tests/architecture/fixture/') &&
        existsSync(join(projectDirectory, path)),
    )
    .map((path) => ({ path, text: readFileSync(join(projectDirectory, path), 'utf8') }));
}

/** The script of a component, with its lines kept in place. */
export function scriptOf(file: SourceFile): string {
  if (!file.path.endsWith('.vue')) return file.text;
  const match = /<script[^>]*>([\s\S]*?)<\/script>/.exec(file.text);
  if (match === null) return '';
  const before = file.text.slice(0, match.index).split('\n').length - 1;
  return '\n'.repeat(before) + (match[1] ?? '');
}

export function parse(file: SourceFile): ts.SourceFile {
  return ts.createSourceFile(file.path, scriptOf(file), ts.ScriptTarget.Latest, true);
}

function specifiersOf(source: ts.SourceFile): { text: string; position: number }[] {
  const found: { text: string; position: number }[] = [];
  const visit = (node: ts.Node): void => {
    const literal =
      (ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) && node.moduleSpecifier !== undefined
        ? node.moduleSpecifier
        : ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword
          ? node.arguments[0]
          : undefined;
    if (literal !== undefined && ts.isStringLiteral(literal))
      found.push({ text: literal.text, position: literal.getStart() });
    ts.forEachChild(node, visit);
  };
  visit(source);
  return found;
}

function targetOf(from: string, specifier: string): string | null {
  if (specifier.startsWith('#')) return specifier.slice(1);
  return specifier.startsWith('.') ? relative('.', join(dirname(from), specifier)) : null;
}

/** All imports of a file: static, re-exported and dynamic. */
export function importsOf(file: SourceFile): ImportUse[] {
  const source = parse(file);
  return specifiersOf(source).map(({ text, position }) => ({
    from: file.path,
    line: source.getLineAndCharacterOfPosition(position).line + 1,
    specifier: text,
    target: targetOf(file.path, text),
  }));
}
