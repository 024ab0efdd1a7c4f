import { basisInputSchema } from '#shared/contract/bases.ts';
import type { BasisSpec } from '#shared/contract/bases.ts';

/** What a person may change in a new version of a basis; numbers are null while a field is empty. */
export interface BasisDraft {
  readonly name: string;
  readonly isDefault: boolean;
  readonly governs: BasisSpec['governs'];
  readonly enduranceSource: string;
  readonly numbers: Readonly<Record<BasisNumber, number | null>>;
}

export const basisNumbers = [
  'windLowerMPerS',
  'windUpperMPerS',
  'enduranceMultiLayerPa',
  'enduranceSingleLayerPa',
  'enduranceAlloyPa',
  'noticeFromRatio',
  'actFromRatio',
  'urgentFromRatio',
  'noticeBelowYears',
  'actBelowYears',
  'urgentBelowYears',
] as const;
export type BasisNumber = (typeof basisNumbers)[number];

/** A draft that takes over what a version says. */
export function basisDraft(from: {
  readonly name: string;
  readonly isDefault: boolean;
  readonly spec: BasisSpec;
}): BasisDraft {
  const { spec } = from;
  return {
    name: from.name,
    isDefault: from.isDefault,
    governs: spec.governs,
    enduranceSource: spec.limits.enduranceSource,
    numbers: {
      windLowerMPerS: spec.windBand.lowerMPerS,
      windUpperMPerS: spec.windBand.upperMPerS,
      enduranceMultiLayerPa: spec.limits.enduranceMultiLayerPa,
      enduranceSingleLayerPa: spec.limits.enduranceSingleLayerPa,
      enduranceAlloyPa: spec.limits.enduranceAlloyPa,
      noticeFromRatio: spec.thresholds.noticeFromRatio,
      actFromRatio: spec.thresholds.actFromRatio,
      urgentFromRatio: spec.thresholds.urgentFromRatio,
      noticeBelowYears: spec.thresholds.noticeBelowYears,
      actBelowYears: spec.thresholds.actBelowYears,
      urgentBelowYears: spec.thresholds.urgentBelowYears,
    },
  };
}

/** The specification a draft stands for; what cannot be drafted stays as in the version it came from. */
function specOf(draft: BasisDraft, former: BasisSpec) {
  const { numbers } = draft;
  return {
    ...former,
    governs: draft.governs,
    windBand: { lowerMPerS: numbers.windLowerMPerS, upperMPerS: numbers.windUpperMPerS },
    limits: {
      ...former.limits,
      enduranceMultiLayerPa: numbers.enduranceMultiLayerPa,
      enduranceSingleLayerPa: numbers.enduranceSingleLayerPa,
      enduranceAlloyPa: numbers.enduranceAlloyPa,
      enduranceSource: draft.enduranceSource,
    },
    thresholds: {
      noticeFromRatio: numbers.noticeFromRatio,
      actFromRatio: numbers.actFromRatio,
      urgentFromRatio: numbers.urgentFromRatio,
      noticeBelowYears: numbers.noticeBelowYears,
      actBelowYears: numbers.actBelowYears,
      urgentBelowYears: numbers.urgentBelowYears,
    },
  };
}

export type BasisFaults = Partial<Record<BasisNumber | 'name' | 'enduranceSource', string>>;

const faultKeys: Readonly<Record<string, BasisNumber | 'name' | 'enduranceSource'>> = {
  lowerMPerS: 'windLowerMPerS',
  upperMPerS: 'windUpperMPerS',
  name: 'name',
  enduranceSource: 'enduranceSource',
};

function orderFaults({ numbers }: BasisDraft): BasisFaults {
  const { noticeFromRatio, actFromRatio, urgentFromRatio, noticeBelowYears, actBelowYears, urgentBelowYears } = numbers;
  const isBelow = (one: number | null, other: number | null) => one === null || other === null || one < other;
  return {
    ...(isBelow(noticeFromRatio, actFromRatio) ? {} : { actFromRatio: 'must be above the one of Notice' }),
    ...(isBelow(actFromRatio, urgentFromRatio) ? {} : { urgentFromRatio: 'must be above the one of Act' }),
    ...(isBelow(actBelowYears, noticeBelowYears) ? {} : { actBelowYears: 'must be below the one of Notice' }),
    ...(isBelow(urgentBelowYears, actBelowYears) ? {} : { urgentBelowYears: 'must be below the one of Act' }),
  };
}

export interface CheckedBasis {
  readonly spec: BasisSpec | null;
  readonly faults: BasisFaults;
}

/** Checks a draft; gives the specification to save when nothing is wrong. */
export function checkedBasis(draft: BasisDraft, former: BasisSpec): CheckedBasis {
  const parsed = basisInputSchema.safeParse({
    name: draft.name,
    spec: specOf(draft, former),
    isDefault: draft.isDefault,
  });
  const faults: BasisFaults = orderFaults(draft);
  for (const issue of parsed.error?.issues ?? []) {
    const last = String(issue.path.at(-1) ?? '');
    const number = basisNumbers.find((one) => one === last || one === faultKeys[last]);
    const key = number ?? faultKeys[last];
    const isEmpty = number !== undefined && draft.numbers[number] === null;
    if (key !== undefined) faults[key] = isEmpty ? 'is required' : issue.message;
  }
  const isGood = parsed.success && Object.keys(faults).length === 0;
  return { spec: isGood ? parsed.data.spec : null, faults };
}
