import { z } from 'zod';
import {
  damperOutputSchema,
  endOutputSchema,
  lifeOutputSchema,
  placeOutputSchema,
  spanOutputSchema,
  wavesOutputSchema,
} from '#shared/contract/engine-output.ts';
import {
  engineProblem,
  fieldErrors,
  pointerOfEnginePath,
  type EngineProblem,
} from '#shared/contract/engine-problem.ts';
import {
  damperInputSchema,
  endInputSchema,
  lifeInputSchema,
  placeInputSchema,
  spanInputSchema,
  wavesInputSchema,
} from '#shared/contract/engine.ts';
import {
  EngineInputError,
  damperCommand,
  endCommand,
  lifeCommand,
  placeCommand,
  spanCommand,
  wavesCommand,
} from '#shared/engine/index.ts';

/** One command of the engine: what it takes, what it gives, and how a document is answered. */
interface EngineCommand {
  readonly summary: string;
  readonly inputSchema: z.ZodType;
  readonly outputSchema: z.ZodType;
  readonly answer: (document: unknown) => EngineAnswer;
}

/** The result of a command, or why the document was not taken. */
type EngineAnswer =
  | { readonly outcome: 'done'; readonly output: unknown }
  | { readonly outcome: 'refused'; readonly problem: EngineProblem };

function command<Input>(
  summary: string,
  schemas: { readonly input: z.ZodType<Input>; readonly output: z.ZodType },
  run: (input: Input) => unknown,
): EngineCommand {
  const answer = (document: unknown): EngineAnswer => {
    const parsed = schemas.input.safeParse(document);
    if (!parsed.success) {
      return { outcome: 'refused', problem: engineProblem('invalid-input', fieldErrors(parsed.error.issues)) };
    }
    try {
      return { outcome: 'done', output: run(parsed.data) };
    } catch (error) {
      if (!(error instanceof EngineInputError)) throw error;
      const field = { pointer: pointerOfEnginePath(error.path), message: error.problem };
      return { outcome: 'refused', problem: engineProblem('invalid-input', [field]) };
    }
  };
  return { summary, inputSchema: schemas.input, outputSchema: schemas.output, answer };
}

/** The commands of the engine by name. */
const engineCommands: Readonly<Record<string, EngineCommand>> = {
  waves: command(
    'Speeds, impedance and lengths of travelling waves on a wire',
    { input: wavesInputSchema, output: wavesOutputSchema },
    wavesCommand,
  ),
  end: command(
    'Reflection, absorption and curvatures of one end of a span',
    { input: endInputSchema, output: endOutputSchema },
    endCommand,
  ),
  damper: command(
    'Driving-point impedance and natural frequencies of a damper',
    { input: damperInputSchema, output: damperOutputSchema },
    damperCommand,
  ),
  span: command(
    'Steady aeolian vibration of a span at given frequencies',
    { input: spanInputSchema, output: spanOutputSchema },
    spanCommand,
  ),
  life: command(
    'Fatigue life from a wind climate or from a recorder',
    { input: lifeInputSchema, output: lifeOutputSchema },
    lifeCommand,
  ),
  place: command(
    'Best dampers and distances for each number of dampers per end',
    { input: placeInputSchema, output: placeOutputSchema },
    placeCommand,
  ),
};

/** JSON Schemas of every command's input and output. */
function describeEngineCommands(): Record<string, { summary: string; input: unknown; output: unknown }> {
  const schemaOf = (schema: z.ZodType, io: 'input' | 'output') => z.toJSONSchema(schema, { io });
  return Object.fromEntries(
    Object.entries(engineCommands).map(([name, { summary, inputSchema, outputSchema }]) => [
      name,
      { summary, input: schemaOf(inputSchema, 'input'), output: schemaOf(outputSchema, 'output') },
    ]),
  );
}

const byteLimit = 64 * 1024 * 1024;
const lineFeed = 0x0a;
const refusedExit = 2;

/** JSON has no NaN or Infinity. Turned into text they are found again, by their path, as what is no number. */
const notNumbers = /(?<=[:[,]\s*)-?(?:NaN|Infinity)(?=\s*[,\]}])/g;

function parseDocument(bytes: Uint8Array): { document: unknown } | EngineAnswer {
  const malformed = (message: string): EngineAnswer => ({
    outcome: 'refused',
    problem: engineProblem('malformed-body', [{ pointer: '', message }]),
  });
  let text: string;
  try {
    text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return malformed('is not UTF-8 text');
  }
  try {
    return { document: JSON.parse(text) };
  } catch (error) {
    const quoted = text.replace(notNumbers, '"$&"');
    if (quoted !== text) {
      try {
        return { document: JSON.parse(quoted) };
      } catch {
        // malformed in more ways: the first error tells
      }
    }
    return malformed(`is not JSON: ${error instanceof Error ? error.message : 'it cannot be read'}`);
  }
}

function answerBytes(command: EngineCommand, bytes: Uint8Array): EngineAnswer {
  const parsed = parseDocument(bytes);
  return 'document' in parsed ? command.answer(parsed.document) : parsed;
}

const tooLarge: EngineAnswer = {
  outcome: 'refused',
  problem: engineProblem('too-large', [{ pointer: '', message: `is larger than ${byteLimit} bytes` }]),
};

/** Waits until the reader of stdout has caught up, so that any number of lines runs in constant memory. */
async function print(text: string): Promise<void> {
  if (process.stdout.write(text)) return;
  await new Promise<void>((resolve) => process.stdout.once('drain', resolve));
}

async function answerWhole(command: EngineCommand): Promise<boolean> {
  const parts: Buffer[] = [];
  let size = 0;
  for await (const part of process.stdin as AsyncIterable<Buffer>) {
    size += part.length;
    if (size <= byteLimit) parts.push(part);
  }
  const answer = size > byteLimit ? tooLarge : answerBytes(command, Buffer.concat(parts));
  if (answer.outcome === 'done') {
    await print(`${JSON.stringify(answer.output)}\n`);
    return true;
  }
  process.stderr.write(`${JSON.stringify(answer.problem)}\n`);
  return false;
}

/** Lines of stdin without their line ends; null stands for a line that is too long. */
async function* inputLines(): AsyncGenerator<Buffer | null> {
  let parts: Buffer[] = [];
  let size = 0;
  const take = (part: Buffer) => {
    size += part.length;
    if (size <= byteLimit) parts.push(part);
  };
  const finish = () => {
    const line = size > byteLimit ? null : Buffer.concat(parts);
    parts = [];
    size = 0;
    return line;
  };
  for await (const part of process.stdin as AsyncIterable<Buffer>) {
    let from = 0;
    for (let end = part.indexOf(lineFeed); end >= 0; end = part.indexOf(lineFeed, from)) {
      take(part.subarray(from, end));
      from = end + 1;
      yield finish();
    }
    take(part.subarray(from));
  }
  if (size > 0) yield finish();
}

const isBlank = (line: Buffer) => line.toString('latin1').trim() === '';

async function answerLines(command: EngineCommand): Promise<boolean> {
  let isClean = true;
  for await (const line of inputLines()) {
    if (line !== null && isBlank(line)) continue;
    const answer = line === null ? tooLarge : answerBytes(command, line);
    if (answer.outcome === 'refused') isClean = false;
    await print(`${JSON.stringify(answer.outcome === 'done' ? answer.output : answer.problem)}\n`);
  }
  return isClean;
}

function refuseUsage(message: string): void {
  process.stderr.write(`${JSON.stringify(engineProblem('invalid-input', [{ pointer: '', message }]))}\n`);
  process.exitCode = refusedExit;
}

const [name = '', ...flags] = process.argv.slice(2);
const chosen = Object.hasOwn(engineCommands, name) ? engineCommands[name] : undefined;
const unknownFlag = flags.find((flag) => flag !== '--lines');
if (unknownFlag !== undefined) refuseUsage(`does not know the option ${unknownFlag}; there is --lines`);
else if (name === 'describe') await print(`${JSON.stringify(describeEngineCommands(), null, 2)}\n`);
else if (chosen === undefined) {
  refuseUsage(`needs a command: ${[...Object.keys(engineCommands), 'describe'].join(', ')}`);
} else {
  const isClean = flags.includes('--lines') ? await answerLines(chosen) : await answerWhole(chosen);
  if (!isClean) process.exitCode = refusedExit;
}
