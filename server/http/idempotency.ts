import { createHash } from 'node:crypto';
import type { Request } from 'express';
import { z } from 'zod';
import type { Actor, Database } from '#server/data/database.ts';
import { claimKey, forgetKey, keepAnswer } from '#server/data/idempotency.repository.ts';
import { AppError } from '#server/platform/errors.ts';

interface Answer {
  readonly status: number;
  readonly body: unknown;
}

const keySchema = z.string().regex(/^[\w-]{8,200}$/, 'must be 8 to 200 letters, digits, _ or -');

/** Runs a creating call once per Idempotency-Key and person: the same key and body answer the first result again. */
export async function onceByKey(
  database: Database,
  context: { actor: Actor; request: Request; routeName: string; input: unknown },
  run: () => Promise<Answer>,
): Promise<Answer> {
  const header = context.request.get('Idempotency-Key');
  if (header === undefined) return run();
  const key = keySchema.safeParse(header);
  if (!key.success) {
    const message = key.error.issues[0]?.message ?? 'is not allowed';
    throw new AppError('invalid-input', `Idempotency-Key ${message}.`, {
      errors: [{ pointer: '/headers/idempotency-key', message }],
    });
  }
  const requestHash = createHash('sha256').update(JSON.stringify(context.input)).digest('hex');
  const claim = { key: key.data, routeName: context.routeName, requestHash };
  const former = await database.withUtility(context.actor, (tx) => claimKey(tx, claim));
  if (former !== null) {
    if (former.requestHash !== requestHash || former.routeName !== context.routeName) {
      throw new AppError('idempotency-mismatch', 'This Idempotency-Key was used for another request.');
    }
    if (former.status === null)
      throw new AppError('wrong-state', 'The first request with this Idempotency-Key still runs.');
    return { status: former.status, body: former.response };
  }
  try {
    const answer = await run();
    await database.withUtility(context.actor, (tx) => keepAnswer(tx, key.data, answer));
    return answer;
  } catch (error) {
    await database.withUtility(context.actor, (tx) => forgetKey(tx, key.data));
    throw error;
  }
}
