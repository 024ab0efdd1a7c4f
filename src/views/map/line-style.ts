import type { PolylineOptions } from 'leaflet';
import type { Grade } from '#shared/contract/grades.ts';

/** Colours of the map, read from the theme. */
export interface MapPalette {
  readonly grades: Readonly<Record<Grade | 'none', string>>;
  readonly paper: string;
  readonly ink: string;
  readonly accent: string;
  readonly land: string;
  readonly landEdge: string;
  readonly terrain: { readonly open: string; readonly sand: string; readonly green: string; readonly wood: string };
}

export function readMapPalette(element: Element): MapPalette {
  const style = getComputedStyle(element);
  const read = (name: string) => style.getPropertyValue(`--colour-${name}`).trim();
  return {
    grades: {
      calm: read('grade-calm'),
      notice: read('grade-notice'),
      act: read('grade-act'),
      urgent: read('grade-urgent'),
      none: read('grade-none'),
    },
    paper: read('paper'),
    ink: read('ink'),
    accent: read('accent'),
    land: read('terrain-open'),
    landEdge: read('terrain-edge'),
    terrain: {
      open: read('terrain-open'),
      sand: read('terrain-sand'),
      green: read('terrain-green'),
      wood: read('terrain-wood'),
    },
  };
}

interface Drawn {
  readonly grade: Grade | null;
  readonly isStale: boolean;
}

/** Strokes of a line by grade, the lower one first: weight and pattern tell grades apart without colour. */
export function strokesOf({ grade, isStale }: Drawn, palette: MapPalette): PolylineOptions[] {
  const colour = palette.grades[grade ?? 'none'];
  const base = { color: colour, lineCap: 'butt' as const, opacity: 1 };
  const strokes: Record<Grade | 'none', PolylineOptions[]> = {
    none: [{ ...base, weight: 1.5, dashArray: '1.5 4' }],
    calm: [{ ...base, weight: 2 }],
    notice: [{ ...base, weight: 3, dashArray: '12 5' }],
    act: [
      { ...base, weight: 4 },
      { ...base, weight: 10, dashArray: '1.5 14' },
    ],
    urgent: [
      { ...base, weight: 6 },
      { ...base, weight: 2, color: palette.paper },
    ],
  };
  const stale: PolylineOptions[] =
    isStale && grade !== null ? [{ ...base, weight: 5, color: palette.paper, dashArray: '2 8' }] : [];
  return [...strokes[grade ?? 'none'], ...stale];
}

/** The halo under a picked line. */
export function pickedStroke(palette: MapPalette): PolylineOptions {
  return { color: palette.accent, weight: 14, opacity: 0.45, lineCap: 'round' };
}

const sandFromM = 0.008;
const greenFromM = 0.04;
const woodFromM = 0.3;

/** Fill of terrain by its roughness: bare and open pale, woods and towns darker. */
export function terrainFill(roughnessM: number, palette: MapPalette): string {
  if (roughnessM >= woodFromM) return palette.terrain.wood;
  if (roughnessM >= greenFromM) return palette.terrain.green;
  return roughnessM >= sandFromM ? palette.terrain.sand : palette.terrain.open;
}
