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
