import type { ChartTone } from './chart-model.ts';

/** Colours of a chart, read from the theme's custom properties. */
export interface ChartPalette {
  readonly paper: string;
  readonly ink: string;
  readonly quiet: string;
  readonly limit: string;
  readonly tones: Readonly<Record<ChartTone, string>>;
}

/** The custom property each colour comes from. */
const toneProperties = {
  stress: '--colour-chart-stress',
  amplitude: '--colour-chart-amplitude',
  wind: '--colour-chart-wind',
  'self-damping': '--colour-chart-self-damping',
  'first-end': '--colour-chart-first-end',
  'second-end': '--colour-chart-second-end',
  flux: '--colour-chart-flux',
} as const satisfies Record<ChartTone, string>;

/** Reads the colours that hold at an element. */
export function readChartPalette(element: Element): ChartPalette {
  const style = getComputedStyle(element);
  const read = (property: string) => style.getPropertyValue(property).trim();
  return {
    paper: read('--colour-paper'),
    ink: read('--colour-ink'),
    quiet: read('--colour-quiet'),
    limit: read('--colour-chart-limit'),
    tones: {
      stress: read(toneProperties.stress),
      amplitude: read(toneProperties.amplitude),
      wind: read(toneProperties.wind),
      'self-damping': read(toneProperties['self-damping']),
      'first-end': read(toneProperties['first-end']),
      'second-end': read(toneProperties['second-end']),
      flux: read(toneProperties.flux),
    },
  };
}

/** The same colour with an opacity; a colour that is not written as six hex digits is given back as it is. */
export function withAlpha(colour: string, alpha: number): string {
  const hex = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(colour);
  if (hex === null) return colour;
  const [red, green, blue] = hex.slice(1).map((digits) => Number.parseInt(digits, 16));
  return `rgba(${red}, ${green}, ${blue}, ${alpha})`;
}
