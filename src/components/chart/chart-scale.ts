/** How the numbers of one quantity are shown in a chart, in the units of the reader. */
export interface ChartScale {
  readonly unit: string;
  /** From SI to the unit shown. */
  readonly shown: (value: number) => number;
  /** Text of a number in the unit shown. */
  readonly format: (shownValue: number) => string;
}

/** Number with its unit, from SI. */
export function quantityText(scale: ChartScale, value: number): string {
  const text = scale.format(scale.shown(value));
  return scale.unit === '' ? text : `${text}\u2009${scale.unit}`;
}

/** Ticks are round numbers; digits that say how well a measured number is known only crowd them. */
export function withoutEndZeros(text: string): string {
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
}

/** Round number with its unit, from SI, for the marks of an axis. */
export function markText(scale: ChartScale, value: number): string {
  return `${withoutEndZeros(scale.format(scale.shown(value)))}\u2009${scale.unit}`;
}
