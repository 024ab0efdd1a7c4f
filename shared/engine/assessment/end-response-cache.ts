/** Responses of ends kept between span wires that share wire, tension, dampers and frequencies. */
export interface EndResponseCache {
  readonly hitCount: number;
  readonly missCount: number;
}
