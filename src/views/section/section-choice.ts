import { gradeRankIndex } from '#shared/contract/grades.ts';
import type { Section } from '#shared/contract/sections.ts';

type SpanWire = Section['spanWires'][number];

export const sectionTabs = ['vibration', 'placements', 'wires', 'history'] as const;
export type SectionTab = (typeof sectionTabs)[number];

/** What the address asks to see; each part may be left out or be out of date. */
export interface AskedChoice {
  readonly span: string | null;
  /** Id of a wire, or of the span wire itself: lists know the one, messages the other. */
  readonly wire: string | null;
}

function isWorse(one: SpanWire, other: SpanWire): boolean {
  const rank = (spanWire: SpanWire) => (spanWire.grade === null ? -1 : gradeRankIndex(spanWire.grade));
  if (rank(one) !== rank(other)) return rank(one) > rank(other);
  return (one.utilisationRatio ?? -1) > (other.utilisationRatio ?? -1);
}

/**
 * The span wire to show: the one asked for, else the worst one that fits what was asked. Null only for a section
 * without span wires.
 */
export function chosenSpanWire(section: Section, asked: AskedChoice): SpanWire | null {
  const fits = (spanWire: SpanWire, parts: AskedChoice) =>
    (parts.span === null || spanWire.spanId === parts.span) &&
    (parts.wire === null || spanWire.wireId === parts.wire || spanWire.id === parts.wire);
  const attempts: AskedChoice[] = [asked, { span: asked.span, wire: null }, { span: null, wire: null }];
  for (const attempt of attempts) {
    const candidates = section.spanWires.filter((spanWire) => fits(spanWire, attempt));
    if (candidates.length > 0) return candidates.reduce((worst, one) => (isWorse(one, worst) ? one : worst));
  }
  return null;
}

/** The tab the address asks for, else the first. */
export function chosenTab(asked: string | null): SectionTab {
  return sectionTabs.find((tab) => tab === asked) ?? 'vibration';
}
