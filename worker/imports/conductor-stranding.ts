import type { StrandGroup, Stranding } from './bending-stiffness.ts';

/** @source common practice: modulus of drawn aluminium and its conductor alloys */
const aluminiumModulusPa = 69e9;
/** @source common practice: modulus of galvanised steel strands */
const steelModulusPa = 200e9;
/** @source from memory: modulus of aluminium-clad steel strands of 20 % conductivity */
const cladSteelModulusPa = 162e9;
const metrePerMillimetre = 1e-3;

interface Metals {
  /** Kind of the catalogue. */
  readonly kind: string;
  readonly outerModulusPa: number;
  readonly coreModulusPa: number;
}

const metals = {
  acsr: { kind: 'ACSR', outerModulusPa: aluminiumModulusPa, coreModulusPa: steelModulusPa },
  'acsr/gz': { kind: 'ACSR', outerModulusPa: aluminiumModulusPa, coreModulusPa: steelModulusPa },
  'acsr/ac': { kind: 'ACSR', outerModulusPa: aluminiumModulusPa, coreModulusPa: cladSteelModulusPa },
  'aacsr/gz': { kind: 'AACSR', outerModulusPa: aluminiumModulusPa, coreModulusPa: steelModulusPa },
  'aacsr/ac': { kind: 'AACSR', outerModulusPa: aluminiumModulusPa, coreModulusPa: cladSteelModulusPa },
  aac: { kind: 'AAC', outerModulusPa: aluminiumModulusPa, coreModulusPa: aluminiumModulusPa },
  aaac: { kind: 'AAAC', outerModulusPa: aluminiumModulusPa, coreModulusPa: aluminiumModulusPa },
  'aaac/1120': { kind: 'AAAC', outerModulusPa: aluminiumModulusPa, coreModulusPa: aluminiumModulusPa },
  acar: { kind: 'ACAR', outerModulusPa: aluminiumModulusPa, coreModulusPa: aluminiumModulusPa },
  'sc/gz': { kind: 'STEEL', outerModulusPa: steelModulusPa, coreModulusPa: steelModulusPa },
  'sc/ac': { kind: 'STEEL', outerModulusPa: cladSteelModulusPa, coreModulusPa: cladSteelModulusPa },
  opgw: { kind: 'OPGW', outerModulusPa: cladSteelModulusPa, coreModulusPa: cladSteelModulusPa },
} as const satisfies Record<string, Metals>;

type ConductorTypeWord = keyof typeof metals;
export const conductorTypes = [
  'acsr',
  'acsr/gz',
  'acsr/ac',
  'aacsr/gz',
  'aacsr/ac',
  'aac',
  'aaac',
  'aaac/1120',
  'acar',
  'sc/gz',
  'sc/ac',
  'opgw',
] as const satisfies readonly ConductorTypeWord[];

interface StrandColumns {
  readonly type: ConductorTypeWord;
  readonly aluminium_strands: number;
  readonly aluminium_strand_diameter_mm?: number | undefined;
  readonly core_strands: number;
  readonly core_strand_diameter_mm?: number | undefined;
  readonly layers_aluminium: number;
}

interface StrandFacts {
  readonly kind: string;
  readonly outerModulusPa: number;
  readonly outerStrandDiameterM: number | null;
  readonly aluminiumLayerCount: number;
  /** Null when the source gives too little, or the wire holds more than round strands. */
  readonly stranding: Stranding | null;
}

function group(strandCount: number, diameterMm: number | undefined, modulusPa: number): StrandGroup | null {
  if (strandCount === 0 || diameterMm === undefined) return null;
  return { strandCount, strandDiameterM: diameterMm * metrePerMillimetre, modulusPa };
}

function strandingOfGroups(outer: StrandGroup, core: StrandGroup | null, outerLayerCount: number): Stranding {
  const isAlike = core !== null && core.strandDiameterM === outer.strandDiameterM && core.modulusPa === outer.modulusPa;
  // Strands that are all alike are packed as one bundle, whatever the source calls its core.
  if (isAlike)
    return { core: null, outer: { ...outer, strandCount: outer.strandCount + core.strandCount }, outerLayerCount };
  return { core, outer, outerLayerCount };
}

/** What the strand columns of a catalogue row say about bending. */
export function strandingOf(row: StrandColumns): StrandFacts {
  const { kind, outerModulusPa, coreModulusPa } = metals[row.type];
  const outer = group(row.aluminium_strands, row.aluminium_strand_diameter_mm, outerModulusPa);
  const core = group(row.core_strands, row.core_strand_diameter_mm, coreModulusPa);
  const outermost = outer ?? (row.aluminium_strands === 0 ? core : null);
  const isKnown = outermost !== null && (row.core_strands === 0 || core !== null);
  // The fibre tube of an OPGW is no strand; its share of the stiffness is not printed.
  const hasTube = row.type === 'opgw';
  return {
    kind,
    outerModulusPa,
    outerStrandDiameterM: outermost?.strandDiameterM ?? null,
    aluminiumLayerCount: hasTube ? 0 : row.layers_aluminium,
    stranding:
      isKnown && !hasTube ? strandingOfGroups(outermost, outermost === core ? null : core, row.layers_aluminium) : null,
  };
}
