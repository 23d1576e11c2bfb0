import { readFileSync, readdirSync } from 'node:fs';

import ts from 'typescript';

/** Reads the documentation of exported functions of a folder, as the compiler sees it. */

/** Blocks that every exported function of `shared/physics` carries, in this order. */
export const BLOCKS = [
  'Formula:',
  '@param',
  '@returns',
  'Range:',
  'Accuracy:',
  'Limits:',
  'Source:',
  '@example',
];

export interface DocumentedFunction {
  readonly file: string;
  readonly name: string;
  /** The whole comment. */
  readonly text: string;
  /** Names of the parameters in the signature: `input.massG` for a member of an object that is written out, else `massG`. */
  readonly signature: readonly string[];
  /** Names documented by `@param`. */
  readonly documented: readonly string[];
  /** `expression // result`, one for each `@example`. */
  readonly examples: readonly { readonly expression: string; readonly shown: string }[];
}

function parameterNames(parameter: ts.ParameterDeclaration): string[] {
  const name = parameter.name.getText();
  if (parameter.type !== undefined && ts.isTypeLiteralNode(parameter.type)) {
    return parameter.type.members.map((member) => `${name}.${member.name?.getText() ?? '?'}`);
  }
  return [name];
}

function commentOf(node: ts.Node, source: ts.SourceFile): string {
  const ranges = ts.getLeadingCommentRanges(source.text, node.getFullStart()) ?? [];
  const last = ranges.at(-1);
  return last === undefined ? '' : source.text.slice(last.pos, last.end);
}

function examplesOf(comment: string) {
  return [...comment.matchAll(/@example\s+(.+?)\s*\/\/\s*(.+?)\s*$/gm)].map((match) => ({
    expression: match[1]!,
    shown: match[2]!,
  }));
}

export function documentedFunctions(folder: URL): DocumentedFunction[] {
  const files = readdirSync(folder).filter((file) => file.endsWith('.ts'));
  return files.flatMap((file) => functionsOfFile(file, readFileSync(new URL(file, folder), 'utf8')));
}

export function functionsOfFile(file: string, text: string): DocumentedFunction[] {
  const source = ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true);
  return source.statements.filter(isExportedFunction).map((statement) => {
    const comment = commentOf(statement, source);
    return {
      file,
      name: statement.name?.text ?? '?',
      text: comment,
      signature: statement.parameters.flatMap(parameterNames),
      documented: [...comment.matchAll(/@param\s+(\S+)/g)].map((match) => match[1]!),
      examples: examplesOf(comment),
    };
  });
}

function isExportedFunction(statement: ts.Statement): statement is ts.FunctionDeclaration {
  return (
    ts.isFunctionDeclaration(statement) &&
    (statement.modifiers ?? []).some((modifier) => modifier.kind === ts.SyntaxKind.ExportKeyword)
  );
}

/** What is wrong with a comment, in words; none when it is complete. */
export function faultsOf(documented: DocumentedFunction): string[] {
  const faults: string[] = [];
  let from = 0;
  for (const block of BLOCKS) {
    if (block === '@param' && documented.signature.length === 0) continue;
    const at = documented.text.indexOf(block, from);
    if (at < 0) faults.push(documented.text.includes(block) ? `${block} out of order` : `no ${block}`);
    else from = at;
  }
  if (!/\/\*\*\s+\*\s+\S/.test(documented.text)) faults.push('no purpose');
  if (documented.documented.join() !== documented.signature.join()) {
    faults.push(`@param ${documented.documented.join()} for ${documented.signature.join()}`);
  }
  if (!/@returns\s+\w/.test(documented.text)) faults.push('@returns says nothing');
  return faults;
}

/** Whether a value is what an example shows: a number to the digits shown, anything else as it is written. */
export function agreesWithShown(value: unknown, shown: string): boolean {
  if (typeof value !== 'number') return String(value) === shown;
  const text = shown.match(/^-?\d+(?:\.(\d+))?/);
  if (text === null) return false;
  const decimals = text[1]?.length ?? 0;
  return Math.abs(value - Number(text[0])) <= 0.5 * 10 ** -decimals + 1e-12;
}
