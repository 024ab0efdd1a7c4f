/** Gives out zeroed series of one length. */
export type SeriesPool = () => Float64Array;

const chunkSeriesCount = 48;

/**
 * Series of one length cut from few large buffers: a buffer of its own for each costs more than filling it.
 *
 * @param lengthCount length of each series, whole number ≥ 0
 * @returns function that gives the next zeroed series
 * @source closed form
 */
export function seriesPool(lengthCount: number): SeriesPool {
  let buffer = new ArrayBuffer(0);
  let usedCount = chunkSeriesCount;
  return () => {
    if (usedCount === chunkSeriesCount) {
      buffer = new ArrayBuffer(chunkSeriesCount * lengthCount * Float64Array.BYTES_PER_ELEMENT);
      usedCount = 0;
    }
    const series = new Float64Array(buffer, usedCount * lengthCount * Float64Array.BYTES_PER_ELEMENT, lengthCount);
    usedCount += 1;
    return series;
  };
}
