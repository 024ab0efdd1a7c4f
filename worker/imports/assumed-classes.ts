import type { ImportOptions } from '#shared/contract/imports.ts';
import { tensionNSchema } from '#shared/contract/quantity.ts';
import type { ConductorLookup } from './conductor-lookup.ts';
import type { IssueList } from './issue-list.ts';
import type { WireDraft } from './line-draft.ts';

export type Assumptions = NonNullable<ImportOptions['assumptions']>;
type VoltageClass = Assumptions['voltageClasses'][number];

/** What is assumed for a line of some voltage, with its wires worked out. */
export interface AssumedClass {
  readonly upToVoltageV: number;
  readonly structureHeightM: number;
  readonly wires: readonly Omit<WireDraft, 'row'>[];
}

/** Names of phase wires in order: A, B, C and on. */
function phaseName(index: number): string {
  return String.fromCharCode('A'.charCodeAt(0) + index);
}

interface ClassContext {
  readonly conductors: ConductorLookup;
  readonly report: (field: string, value: unknown, message: string) => void;
}

function assumedClass(
  voltageClass: VoltageClass,
  field: string,
  { conductors, report }: ClassContext,
): AssumedClass | null {
  const choice = conductors.choose(voltageClass.conductorName, voltageClass.conductorStandard);
  if (choice.outcome === 'unknown') {
    report(`${field}.conductorName`, voltageClass.conductorName, choice.message);
    return null;
  }
  const { conductor } = choice;
  const tensionN = voltageClass.tensionRatedRatio * conductor.ratedStrengthN;
  if (!tensionNSchema.safeParse(tensionN).success) {
    report(
      `${field}.tensionRatedRatio`,
      voltageClass.tensionRatedRatio,
      `The tension of ${conductor.name} comes to ${tensionN.toFixed(0)} N; allowed: 100 to 500000 N.`,
    );
    return null;
  }
  const wires = Array.from({ length: voltageClass.phaseWireCount }, (_, index) => ({
    name: phaseName(index),
    kind: 'phase' as const,
    conductorTypeId: conductor.id,
    massKgPerM: conductor.massKgPerM,
    tensionN,
  }));
  return { upToVoltageV: voltageClass.upToVoltageV, structureHeightM: voltageClass.structureHeightM, wires };
}

/** The voltage classes of the assumptions with their conductors found; errors name the class by its place in the list. */
export function assumedClasses(
  assumptions: Assumptions,
  conductors: ConductorLookup,
  issues: IssueList,
): AssumedClass[] {
  const report = (field: string, value: unknown, message: string) =>
    issues.addError({ row: null, field, value, message });
  return assumptions.voltageClasses.flatMap((voltageClass, index) => {
    const found = assumedClass(voltageClass, `assumptions.voltageClasses[${index}]`, { conductors, report });
    return found === null ? [] : [found];
  });
}

/** The first class that reaches up to the voltage of a line. */
export function classOfVoltage(classes: readonly AssumedClass[], voltageV: number): AssumedClass | undefined {
  return classes.find(({ upToVoltageV }) => upToVoltageV >= voltageV);
}
