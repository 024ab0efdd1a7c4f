import type { Section } from '#shared/contract/sections.ts';

export interface SpanWireChoice {
  readonly spanId: string;
  readonly wireId: string;
}

type Step = readonly [spanSteps: number, wireSteps: number];

const keySteps: Readonly<Record<string, Step>> = {
  ArrowRight: [1, 0],
  ArrowLeft: [-1, 0],
  ArrowDown: [0, 1],
  ArrowUp: [0, -1],
  Home: [-Infinity, 0],
  End: [Infinity, 0],
};

const clamped = (index: number, count: number) => Math.min(Math.max(index, 0), count - 1);

/** Span wire that an arrow key, Home or End leads to; null for another key or at the edge. */
export function steppedChoice(section: Section, choice: SpanWireChoice, key: string): SpanWireChoice | null {
  const step = keySteps[key];
  if (step === undefined) return null;
  const spanIndex = section.spans.findIndex((span) => span.id === choice.spanId);
  const wireIndex = section.wires.findIndex((wire) => wire.id === choice.wireId);
  const span = section.spans[clamped(spanIndex + step[0], section.spans.length)];
  const wire = section.wires[clamped(wireIndex + step[1], section.wires.length)];
  if (span === undefined || wire === undefined) return null;
  return span.id === choice.spanId && wire.id === choice.wireId ? null : { spanId: span.id, wireId: wire.id };
}
