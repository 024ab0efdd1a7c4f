import type { PartialMethodChoice } from '../methods/method-choice.ts';
import type { UserCurves } from '../methods/user-curves.ts';
import { spanMethodNotes, spanWarnings } from '../span/span-notes.ts';
import { spanRows } from '../span/span-rows.ts';
import type { SpanRow } from '../span/span-row.ts';
import { spanSetup, type SpanInput } from '../span/span-setup.ts';
import { commandHead, type CommandHead } from './command-head.ts';
import { checkedFrequencies } from './waves-command.ts';

/** Input of `span`. */
export interface SpanCommandInput extends SpanInput {
  readonly frequenciesHz: readonly number[];
  readonly methods?: PartialMethodChoice | undefined;
  readonly curves?: UserCurves | undefined;
}

/**
 * Steady vibration of a span at given frequencies, with strains, powers and how well they close.
 *
 * @param input span wire in its wind, frequencies [n], methods by name
 * @returns rows [n] in the order of the frequencies
 * @throws EngineInputError naming the field; a self-damping law outside its validity is refused
 * @source closed form on the chosen methods
 * @validity see the warnings
 * @accuracy see solveSpanBalance
 */
export function spanCommand(input: SpanCommandInput): CommandHead & { rows: SpanRow[] } {
  const frequenciesHz = checkedFrequencies(input.frequenciesHz);
  const setup = spanSetup(input, { methods: input.methods ?? {}, curves: input.curves, outsideValidity: 'refuse' });
  const { rows, sweep } = spanRows(setup, frequenciesHz);
  return { ...commandHead(spanMethodNotes(setup), spanWarnings(setup, sweep)), rows };
}
