import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { z } from 'zod';
import { projectDirectory } from '../setup.mjs';

interface Outcome {
  readonly passedCount: number;
  readonly failedCount: number;
}
type Environment = Readonly<Record<string, string>>;

const modules = join(projectDirectory, 'node_modules');

function say(sentence: string): void {
  process.stdout.write(`${sentence}\n`);
}

function run(script: string, argumentsGiven: readonly string[], environment: Environment): Promise<number> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [join(modules, script), ...argumentsGiven], {
      cwd: projectDirectory,
      stdio: ['ignore', 'inherit', 'inherit'],
      env: { ...process.env, ...environment },
    });
    child.once('exit', (code) => resolve(code ?? 1));
  });
}

/** A tool that passes or fails as a whole counts as one check. */
async function runTool(name: string, script: string, argumentsGiven: readonly string[]): Promise<Outcome> {
  say(`\n== ${name}`);
  const code = await run(script, argumentsGiven, {});
  say(code === 0 ? `${name}: passed` : `${name}: FAILED`);
  return code === 0 ? { passedCount: 1, failedCount: 0 } : { passedCount: 0, failedCount: 1 };
}

const reportSchema = z.object({
  numPassedTests: z.number(),
  numFailedTests: z.number(),
  numFailedTestSuites: z.number(),
  testResults: z.array(z.object({ status: z.string(), assertionResults: z.array(z.unknown()) })),
});

/** Runs test projects; a file that could not even be loaded counts as a failed check. */
async function runTests(projects: readonly string[], environment: Environment): Promise<Outcome> {
  say(`\n== tests: ${projects.join(', ')}`);
  const directory = mkdtempSync(join(tmpdir(), 'stillspan-report-'));
  const report = join(directory, 'report.json');
  const flags = [
    'run',
    ...projects.flatMap((project) => ['--project', project]),
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ];
  const code = await run('vitest/vitest.mjs', flags, environment);
  try {
    const found = reportSchema.parse(JSON.parse(readFileSync(report, 'utf8')));
    const unloadedCount = found.testResults.filter(
      ({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0,
    ).length;
    const failedCount = found.numFailedTests + unloadedCount;
    return { passedCount: found.numPassedTests, failedCount: failedCount === 0 && code !== 0 ? 1 : failedCount };
  } catch (error) {
    say(`the test run left no report: ${String(error)}`);
    return { passedCount: 0, failedCount: 1 };
  } finally {
    rmSync(directory, { recursive: true, force: true });
  }
}

async function runWithServices(projects: readonly string[]): Promise<Outcome[]> {
  const { startTestServices } = await import('../../tests/support/services.ts');
  const services = await startTestServices();
  const environment = {
    TEST_POSTGRES_PORT: String(services.postgresPort),
    TEST_POSTGRES_PASSWORD: services.superuserPassword,
    TEST_REDIS_URL: services.redisUrl,
  };
  try {
    const outcomes: Outcome[] = [];
    for (const project of projects) outcomes.push(await runTests([project], environment));
    return outcomes;
  } finally {
    await services.stop();
  }
}

const lint = () => runTool('lint', 'eslint/bin/eslint.js', ['.', '--max-warnings', '0']);
const types = () => runTool('types', 'vue-tsc/bin/vue-tsc.js', ['--noEmit']);
const build = () => runTool('client build', 'vite/bin/vite.js', ['build', '--logLevel', 'warn']);

/** Runs the checks and prints how many passed; the exit code is 0 only when all did. */
export async function runChecks(extent: 'quick' | 'everything'): Promise<number> {
  const outcomes = [await lint(), await types()];
  if (extent === 'quick') {
    outcomes.push(await runTests(['unit', 'client'], {}));
  } else {
    outcomes.push(await runTests(['unit', 'client', 'reference', 'architecture'], {}));
    outcomes.push(await build());
    outcomes.push(...(await runWithServices(['contract', 'integration', 'e2e'])));
  }
  const sum = (pick: (outcome: Outcome) => number) => outcomes.reduce((total, outcome) => total + pick(outcome), 0);
  const [passedCount, failedCount] = [sum((outcome) => outcome.passedCount), sum((outcome) => outcome.failedCount)];
  say(`\n${passedCount} passed, ${failedCount} failed`);
  return failedCount === 0 && passedCount > 0 ? 0 : 1;
}
