/** One half of a damper: messenger of a length, stiffness and hysteretic loss with a rigid weight at its tip. */
export interface DamperHalf {
  readonly massKg: number;
  /** Inertia of the weight about its own centre of mass. */
  readonly inertiaKgM2: number;
  readonly armLengthM: number;
  readonly armStiffnessNm2: number;
  /** Centre of mass of the weight beyond the tip of the messenger; negative lies towards the damper clamp. */
  readonly offsetM: number;
  readonly lossRatio: number;
}

/** Force over velocity at the damper clamp at one frequency, phase of the force ahead of the velocity. */
export type ImpedanceRow =
  | { readonly frequencyHz: number; readonly realNsPerM: number; readonly imaginaryNsPerM: number }
  | { readonly frequencyHz: number; readonly magnitudeNsPerM: number; readonly phaseRad: number };

/** Damper described by its parts. */
export interface HalvesDamperModel {
  readonly kind: 'halves';
  readonly clampMassKg: number;
  readonly halves: readonly DamperHalf[];
}

/** Damper described by a measured impedance table, used inside its frequencies only. */
export interface TableDamperModel {
  readonly kind: 'table';
  readonly rows: readonly ImpedanceRow[];
  /** Clamp velocity, zero to peak, at which the table was measured. */
  readonly clampVelocityMPerS?: number | undefined;
}

/** Damper described by impedance tables measured at several clamp velocities, rising. */
export interface VelocityTablesDamperModel {
  readonly kind: 'velocity-tables';
  readonly tables: readonly { readonly clampVelocityMPerS: number; readonly rows: readonly ImpedanceRow[] }[];
}

/** What the engine knows of a damper. */
export type DamperModel = HalvesDamperModel | TableDamperModel | VelocityTablesDamperModel;
