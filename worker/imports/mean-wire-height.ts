import type { WireDraft } from './line-draft.ts';

/** @source published: standard gravity, 3rd CGPM 1901 */
const gravityMPerS2 = 9.80665;
/** A parabola lies two thirds of its sag below the chord on average. @source closed form: mean of 1 - (2x/L)² is 2/3 */
const meanShareOfSagRatio = 2 / 3;
/** Lower than this no wire hangs on average over flat ground; the ground must fall away below it. @source own model */
const lowestMeanHeightM = 6;

interface HungSpan {
  readonly spanLengthM: number;
  readonly fromHeightM: number;
  readonly toHeightM: number;
  readonly wires: readonly Pick<WireDraft, 'massKgPerM' | 'tensionN'>[];
}

type MeanHeight = { readonly heightM: number; readonly isOverValley: boolean };

/** Sag of a level span. @source closed form: parabola, w L² / (8 H) */
export function sagM(spanLengthM: number, { massKgPerM, tensionN }: HungSpan['wires'][number]): number {
  return (massKgPerM * gravityMPerS2 * spanLengthM ** 2) / (8 * tensionN);
}

/**
 * Mean height of the wires of a span above flat ground: mean of both attachment heights less two thirds of the mean sag.
 * Where that comes out too low for any line, the span crosses a valley of unknown depth, and the mean attachment height is
 * taken.
 */
export function meanWireHeight({ spanLengthM, fromHeightM, toHeightM, wires }: HungSpan): MeanHeight {
  const attachmentM = (fromHeightM + toHeightM) / 2;
  const sagsM = wires.map((wire) => sagM(spanLengthM, wire));
  const meanSagM = sagsM.reduce((sum, sag) => sum + sag, 0) / Math.max(1, sagsM.length);
  const heightM = attachmentM - meanShareOfSagRatio * meanSagM;
  const lowestM = Math.min(lowestMeanHeightM, attachmentM / 2);
  return heightM >= lowestM ? { heightM, isOverValley: false } : { heightM: attachmentM, isOverValley: true };
}
