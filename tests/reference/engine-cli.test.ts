import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import {
  endOutputSchema,
  damperOutputSchema,
  spanOutputSchema,
  wavesOutputSchema,
} from '#shared/contract/engine-output.ts';
import { aSpanWire, endWith, referenceDamper, referenceTensionN, referenceWire } from './engine-cases.ts';

const root = fileURLToPath(new URL('../..', import.meta.url));

interface Run {
  readonly code: number | null;
  readonly out: string;
  readonly err: string;
}

function engine(args: readonly string[], input: string | Buffer): Promise<Run> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, ['--import', 'tsx', 'server/cli/engine.ts', ...args], { cwd: root });
    let out = '';
    let err = '';
    child.stdout.setEncoding('utf8').on('data', (part: string) => (out += part));
    child.stderr.setEncoding('utf8').on('data', (part: string) => (err += part));
    child.on('error', reject).on('close', (code) => resolve({ code, out, err }));
    child.stdin.end(input);
  });
}

const { wire, air } = aSpanWire();
const span = { lengthM: 350, tensionN: referenceTensionN };
const spanDocument = {
  schema: 'stillspan.engine/1',
  wire,
  span,
  air,
  ends: [endWith(1), endWith()],
  frequenciesHz: [10, 20, 30],
};

describe('the engine on the command line', () => {
  it('answers span with rows as documented', async () => {
    const run = await engine(['span'], JSON.stringify(spanDocument));
    expect(run).toMatchObject({ code: 0, err: '' });
    const output = spanOutputSchema.strict().parse(JSON.parse(run.out));
    expect(output.rows.map((row) => row.frequencyHz)).toEqual([10, 20, 30]);
    expect(output.rows[2]?.endReflectionRatio[0]).toBeCloseTo(0.809884, 6);
    expect(output.rows[2]?.damperClampStrainRatio.map((strains) => strains.length)).toEqual([1, 0]);
  });

  it('answers waves, end and damper', async () => {
    const [waves, end, damper] = await Promise.all([
      engine(['waves'], JSON.stringify({ wire, span: { tensionN: referenceTensionN }, frequenciesHz: [30] })),
      engine(['end'], JSON.stringify({ wire, tensionN: referenceTensionN, end: endWith(1), frequenciesHz: [30] })),
      engine(['damper'], JSON.stringify({ model: referenceDamper, frequenciesHz: [10] })),
    ]);
    expect(wavesOutputSchema.parse(JSON.parse(waves.out)).rows[0]?.loopLengthM).toBeCloseTo(2.180791, 6);
    expect(endOutputSchema.parse(JSON.parse(end.out)).rows[0]?.clampCurvaturePerM2).toBeCloseTo(34.56883, 5);
    expect(damperOutputSchema.parse(JSON.parse(damper.out)).rows[0]?.impedance?.re).toBeCloseTo(303.9529, 4);
  });

  it('keeps the order of dampers and frequencies as given', async () => {
    const document = { ...spanDocument, ends: [endWith(2.2, 1), endWith()], frequenciesHz: [30, 10] };
    const sorted = { ...spanDocument, ends: [endWith(1, 2.2), endWith()], frequenciesHz: [10, 30] };
    const [given, straight] = await Promise.all(
      [document, sorted].map(async (input) =>
        spanOutputSchema.parse(JSON.parse((await engine(['span'], JSON.stringify(input))).out)),
      ),
    );
    const first = given?.rows[0]?.damperClampStrainRatio[0];
    const last = straight?.rows[1]?.damperClampStrainRatio[0];
    expect(first?.[0]).toBeCloseTo(last?.[1] ?? NaN, 15);
    expect(first?.[1]).toBeCloseTo(last?.[0] ?? NaN, 15);
  });

  it.each([
    ['no JSON', '{"wire":', 'malformed-body', ''],
    ['NaN', JSON.stringify(spanDocument).replace('"lengthM":350', '"lengthM":NaN'), 'invalid-input', '/span/lengthM'],
    [
      'Infinity',
      JSON.stringify(spanDocument).replace('"lengthM":350', '"lengthM":1e999'),
      'invalid-input',
      '/span/lengthM',
    ],
    ['a missing key', JSON.stringify({ ...spanDocument, air: undefined }), 'invalid-input', '/air'],
    ['an unknown key', JSON.stringify({ ...spanDocument, wind: 3 }), 'invalid-input', '/wind'],
    [
      'too much tension',
      JSON.stringify({ ...spanDocument, span: { ...span, tensionN: 2e5 } }),
      'invalid-input',
      '/span/tensionN',
    ],
    ['no frequency', JSON.stringify({ ...spanDocument, frequenciesHz: [0] }), 'invalid-input', '/frequenciesHz/0'],
    [
      'a law outside its validity',
      JSON.stringify({
        ...spanDocument,
        wire: { ...referenceWire, diameterM: 0.012 },
        methods: { selfDamping: 'self-damping-power-noiseux' },
      }),
      'invalid-input',
      '/methods/selfDamping',
    ],
  ])('refuses %s with a problem document and exit 2', async (_, input, code, pointer) => {
    const run = await engine(['span'], input);
    expect(run).toMatchObject({ code: 2, out: '' });
    const problem: unknown = JSON.parse(run.err);
    expect(problem).toMatchObject({ code, status: 400, errors: [{ pointer }] });
  });

  it('refuses text that is not UTF-8', async () => {
    const run = await engine(['span'], Buffer.from([0x7b, 0xff, 0xfe, 0x7d]));
    expect(run.code).toBe(2);
    expect(JSON.parse(run.err)).toMatchObject({ code: 'malformed-body' });
  });

  it('refuses a table row with a negative real part by its number', async () => {
    const rows = [5, 10, 15].map((frequencyHz) => ({ frequencyHz, realNsPerM: 10 - frequencyHz, imaginaryNsPerM: 0 }));
    const run = await engine(['damper'], JSON.stringify({ model: { kind: 'table', rows }, frequenciesHz: [7] }));
    expect(JSON.parse(run.err)).toMatchObject({ errors: [{ pointer: '/model/rows/2/realNsPerM' }] });
  });

  it('answers line by line, puts a problem in place of a bad line, and ends with 2', async () => {
    const good = JSON.stringify(spanDocument);
    const run = await engine(['span', '--lines'], `${good}\n{"a":1}\n\n${good}`);
    expect(run.code).toBe(2);
    const lines = run.out
      .trim()
      .split('\n')
      .map((line): unknown => JSON.parse(line));
    expect(lines).toHaveLength(3);
    expect(lines[1]).toMatchObject({ code: 'invalid-input' });
    expect(lines[2]).toEqual(lines[0]);
  });

  it('describes every command by JSON Schemas', async () => {
    const run = await engine(['describe'], '');
    const described: unknown = JSON.parse(run.out);
    expect(described).toMatchObject({
      span: { input: { type: 'object', required: expect.arrayContaining(['wire', 'span', 'air', 'ends']) as unknown } },
    });
  });

  it('refuses an unknown command', async () => {
    expect((await engine(['fly'], '')).code).toBe(2);
  });
});
