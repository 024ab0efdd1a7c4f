import type { SearchPoints } from './search-worst.ts';

/**
 * Lowest and highest frequency at which a limit is exceeded, straight lines between the points.
 *
 * @param points use of the limit at rising frequencies; −1 where there is no data
 * @returns band [Hz], or null if no point exceeds the limit
 * @source closed form
 * @validity if there are several bands, the band from the first to the last
 * @accuracy a share of the step between points
 */
export function exceedanceBand(points: SearchPoints): { lowerHz: number; upperHz: number } | null {
  const { frequenciesHz, utilisations } = points;
  const isOver = utilisations.map((used) => used > 1);
  const first = isOver.indexOf(true);
  const last = isOver.lastIndexOf(true);
  if (first < 0) return null;
  const crossing = (inside: number, outside: number) => {
    const fIn = frequenciesHz[inside] ?? 0;
    const fOut = frequenciesHz[outside];
    const uIn = utilisations[inside] ?? 1;
    const uOut = utilisations[outside];
    if (fOut === undefined || uOut === undefined || uOut < 0) return fIn;
    return fIn + ((fOut - fIn) * (uIn - 1)) / (uIn - uOut);
  };
  return { lowerHz: crossing(first, first - 1), upperHz: crossing(last, last + 1) };
}
