/** Strands of one metal in a stranded wire. */
export interface StrandGroup {
  readonly strandCount: number;
  readonly strandDiameterM: number;
  readonly modulusPa: number;
}

export interface Stranding {
  /** Strands of the core, or null where all strands are alike. */
  readonly core: StrandGroup | null;
  readonly outer: StrandGroup;
  /** Layers of the outer strands, round the core or the centre strand. */
  readonly outerLayerCount: number;
}

interface Ring {
  readonly strandCount: number;
  readonly radiusM: number;
  readonly group: StrandGroup;
}

/** Each layer of round strands holds six more than the one below. @source closed form: hexagonal packing */
const moreStrandsALayerCount = 6;

function strandStiffnessNm2({ strandDiameterM, modulusPa }: StrandGroup): number {
  return (modulusPa * Math.PI * strandDiameterM ** 4) / 64;
}

/**
 * Bending stiffness of a stranded wire whose strands slip freely.
 *
 * @returns stiffness, scalar [N·m²]
 * @source closed form: ΣE·π·d⁴/64 over the strands
 */
export function bendingStiffnessMinNm2({ core, outer }: Stranding): number {
  const groups = core === null ? [outer] : [core, outer];
  return groups.reduce((sum, group) => sum + group.strandCount * strandStiffnessNm2(group), 0);
}

/** Strands in each of some layers that hold so many together, or null when they are not full layers. */
export function layerCounts(strandCount: number, layerCount: number): number[] | null {
  const extra = (moreStrandsALayerCount * layerCount * (layerCount - 1)) / 2;
  const first = (strandCount - extra) / layerCount;
  if (!Number.isInteger(first) || first < 1) return null;
  return Array.from({ length: layerCount }, (_, index) => first + moreStrandsALayerCount * index);
}

/** Rings of strands round a centre of some radius; null when the strands do not make full layers. */
function ringsAround(group: StrandGroup, layerCount: number, centreRadiusM: number): Ring[] | null {
  const counts = layerCount === 0 ? null : layerCounts(group.strandCount, layerCount);
  return (
    counts?.map((strandCount, index) => ({
      strandCount,
      radiusM: centreRadiusM + (index + 0.5) * group.strandDiameterM,
      group,
    })) ?? null
  );
}

/** Rings of strands that are all alike, packed from the middle: three in a triangle, or whole layers round one. */
function packedRings(group: StrandGroup): Ring[] | null {
  if (group.strandCount === 3) return [{ strandCount: 3, radiusM: group.strandDiameterM / Math.sqrt(3), group }];
  const centre: Ring = { strandCount: 1, radiusM: 0, group };
  if (group.strandCount === 1) return [centre];
  for (let layerCount = 1; layerCount <= 6; layerCount += 1) {
    const full = 1 + (moreStrandsALayerCount * layerCount * (layerCount + 1)) / 2;
    if (full !== group.strandCount) continue;
    const around = ringsAround({ ...group, strandCount: full - 1 }, layerCount, group.strandDiameterM / 2);
    return around === null ? null : [centre, ...around];
  }
  return null;
}

function ringsOf({ core, outer, outerLayerCount }: Stranding): Ring[] | null {
  if (core === null) return packedRings(outer);
  const inside = packedRings(core);
  const lastRing = inside?.[inside.length - 1];
  if (inside === null || lastRing === undefined) return null;
  const around = ringsAround(outer, outerLayerCount, lastRing.radiusM + core.strandDiameterM / 2);
  return around === null ? null : [...inside, ...around];
}

/**
 * Bending stiffness of a stranded wire whose strands do not slip, the lay angle ignored.
 *
 * @returns stiffness, scalar [N·m²], or null when the strands do not make full layers
 * @source closed form: Σ over rings of n·E·(π·d⁴/64 + (π·d²/4)·r²/2)
 */
export function bendingStiffnessMaxNm2(stranding: Stranding): number | null {
  const rings = ringsOf(stranding);
  if (rings === null) return null;
  return rings.reduce((sum, { strandCount, radiusM, group }) => {
    const areaM2 = (Math.PI * group.strandDiameterM ** 2) / 4;
    const aboutMiddle = (group.modulusPa * areaM2 * radiusM ** 2) / 2;
    return sum + strandCount * (strandStiffnessNm2(group) + aboutMiddle);
  }, 0);
}
