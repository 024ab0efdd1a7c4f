/** Lanes that share the chunks of one assessment: as many workers can compute it side by side. */
export const laneCount = 4;
