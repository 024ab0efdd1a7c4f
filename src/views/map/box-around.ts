/** About 2 km, so that a single span is not shown without its surroundings. */
const marginDeg = 0.02;

/** Box [west, south, east, north] around places [longitude, latitude], with a margin; null around nothing. */
export function boxAround(placesDeg: readonly (readonly number[])[]): [number, number, number, number] | null {
  if (placesDeg.length === 0) return null;
  const longitudes = placesDeg.map(([longitude = 0]) => longitude);
  const latitudes = placesDeg.map(([, latitude = 0]) => latitude);
  const least = (values: readonly number[]) => values.reduce((one, other) => Math.min(one, other), Infinity);
  const most = (values: readonly number[]) => values.reduce((one, other) => Math.max(one, other), -Infinity);
  return [
    least(longitudes) - marginDeg,
    least(latitudes) - marginDeg,
    most(longitudes) + marginDeg,
    most(latitudes) + marginDeg,
  ];
}
