import { readFileSync, readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { faultOf } from './import-rules.ts';
import { importsOf, sourceFiles } from './project-files.ts';

const files = sourceFiles();
const uses = files.flatMap(importsOf);

describe('imports', () => {
  it('stay within the zones', () => {
    const faults = uses.flatMap((use) => {
      const fault = faultOf(use);
      return fault === null ? [] : [`${use.from}:${use.line} ${fault} (${use.specifier})`];
    });
    expect(faults).toEqual([]);
  });

  it('form no cycle', () => {
    const known = new Set(files.map(({ path }) => path));
    const edges = new Map<string, string[]>();
    for (const { from, target } of uses)
      if (target !== null && known.has(target)) edges.set(from, [...(edges.get(from) ?? []), target]);
    const states = new Map<string, 'open' | 'closed'>();
    const cycles: string[] = [];
    const visit = (path: string, trail: readonly string[]): void => {
      if (states.get(path) === 'closed') return;
      if (states.get(path) === 'open') {
        cycles.push([...trail.slice(trail.indexOf(path)), path].join(' → '));
        return;
      }
      states.set(path, 'open');
      for (const next of edges.get(path) ?? []) visit(next, [...trail, path]);
      states.set(path, 'closed');
    };
    for (const path of known) visit(path, []);
    expect(cycles).toEqual([]);
  });

  it('are judged by rules that find what is forbidden', () => {
    const directory = fileURLToPath(new URL('./fixture/', import.meta.url));
    const found = readdirSync(directory)
      .sort()
      .map((name) => {
        const text = readFileSync(`${directory}${name}`, 'utf8');
        const path = /^\/\/ stands at (\S+)/.exec(text)?.[1] ?? '';
        return importsOf({ path, text }).map((use) => faultOf(use));
      });
    expect(found).toEqual([
      ['client must not import the package node:fs'],
      ['engine must not import the package zod'],
      ['risk must not import alerts'],
      ['client must not import data'],
      ['worker must not import server'],
    ]);
  });
});
