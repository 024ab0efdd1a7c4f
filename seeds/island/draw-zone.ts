import { coordinatesDeg, type Anchor } from './plane.ts';
import type { ZonePlan } from './plan.ts';
import { createRandom } from './random.ts';

const cornerCount = 72;
const waveCount = 5;

interface Wave {
  readonly heightRatio: number;
  readonly phaseRad: number;
}

function waves(seed: number): Wave[] {
  const random = createRandom(seed);
  return Array.from({ length: waveCount }, (_, index) => ({
    heightRatio: (0.09 * (0.5 + random())) / (index + 1),
    phaseRad: 2 * Math.PI * random(),
  }));
}

/** A ring round a zone: an ellipse with an uneven edge that closes. */
export function drawZone(zone: ZonePlan, seed: number, anchor: Anchor) {
  const edge = waves(seed);
  const ring = Array.from({ length: cornerCount }, (_, corner) => {
    const angle = (2 * Math.PI * corner) / cornerCount;
    const reach = edge.reduce(
      (sum, { heightRatio, phaseRad }, index) => sum + heightRatio * Math.sin((index + 2) * angle + phaseRad),
      1,
    );
    const place = {
      eastM: zone.centre.eastM + zone.halfWidthM * reach * Math.cos(angle),
      northM: zone.centre.northM + zone.halfHeightM * reach * Math.sin(angle),
    };
    return coordinatesDeg(place, anchor);
  });
  const [first] = ring;
  return {
    type: 'Feature',
    properties: { name: zone.name, roughness_m: zone.roughnessM },
    geometry: { type: 'MultiPolygon', coordinates: [[first === undefined ? ring : [...ring, first]]] },
  };
}
