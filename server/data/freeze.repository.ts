import { z } from 'zod';
import type { Selection } from '#shared/contract/assessments.ts';
import type { UtilityTransaction } from './database.ts';
import { frozenConductorSchema } from './frozen-input.ts';

const conditions = {
  spans: 'spans.id = any(:ids::uuid[])',
  sections: 'spans.section_id = any(:ids::uuid[])',
  lines: 'spans.line_id = any(:ids::uuid[])',
  'whole-network': 'true',
} as const;

function idsOf(selection: Selection): readonly string[] {
  switch (selection.kind) {
    case 'spans':
      return selection.spanIds;
    case 'sections':
      return selection.sectionIds;
    case 'lines':
      return selection.lineIds;
    case 'whole-network':
      return [];
  }
}

const itemRow = z.object({
  spanWireId: z.uuid(),
  conductorTypeId: z.uuid(),
  spanLengthM: z.number(),
  bearingDeg: z.number(),
  meanWireHeightM: z.number(),
  roughnessM: z.number(),
  tensionN: z.number(),
  fromStructureName: z.string(),
  toStructureName: z.string(),
  isAssumed: z.boolean(),
});
export type SelectedItem = z.infer<typeof itemRow>;

/**
 * Span wires of a selection whose conductor can be assessed, wire by wire along each section: neighbours share conductor
 * and tension, so that what the engine computes for an end is used again.
 */
export function selectSpanWires(tx: UtilityTransaction, selection: Selection): Promise<SelectedItem[]> {
  return tx.rows(
    itemRow,
    `select span_wires.id as span_wire_id, wires.conductor_type_id, spans.span_length_m, spans.bearing_deg, spans.mean_wire_height_m,
       spans.roughness_m, wires.tension_n, first_structure.name as from_structure_name, second_structure.name as to_structure_name,
       (spans.is_assumed or wires.is_assumed) as is_assumed
     from span_wires
     join spans on spans.id = span_wires.span_id
     join wires on wires.id = span_wires.wire_id
     join conductor_types on conductor_types.id = wires.conductor_type_id
     join structures as first_structure on first_structure.id = spans.from_structure_id
     join structures as second_structure on second_structure.id = spans.to_structure_id
     where ${conditions[selection.kind]}
       and conductor_types.bending_stiffness_min_nm2 is not null and conductor_types.outer_strand_diameter_m is not null
     order by span_wires.section_id, wires.conductor_type_id, wires.tension_n, wires.id, spans.order_index`,
    { ids: idsOf(selection) },
  );
}

const conductorRow = frozenConductorSchema.extend({ id: z.uuid() });

export function selectConductors(tx: UtilityTransaction, ids: readonly string[]) {
  return tx.rows(
    conductorRow,
    `select id, name, standard, kind, source, standing, aluminium_layer_count, diameter_m, mass_kg_per_m, rated_strength_n,
       bending_stiffness_min_nm2, outer_strand_diameter_m, outer_strand_modulus_pa
     from conductor_types where id = any(:ids::uuid[])`,
    { ids },
  );
}

const placementRow = z.object({
  placementId: z.uuid(),
  spanWireId: z.uuid(),
  side: z.enum(['from', 'to']),
  damperTypeId: z.uuid(),
  distanceM: z.number(),
  plannedDistanceM: z.number().nullable(),
});

/** As-built dampers that stand on the span wires of a selection; planned ones do not damp yet. */
export function selectStandingPlacements(tx: UtilityTransaction, selection: Selection) {
  return tx.rows(
    placementRow,
    `select placements.id as placement_id, placements.span_wire_id, placements.side, placements.damper_type_id,
       placements.distance_m, placements.planned_distance_m
     from placements
     join span_wires on span_wires.id = placements.span_wire_id
     join spans on spans.id = span_wires.span_id
     where placements.state = 'as-built' and placements.ended_at is null and ${conditions[selection.kind]}
     order by placements.span_wire_id, placements.side, placements.distance_m`,
    { ids: idsOf(selection) },
  );
}

export function selectDamperTypes(tx: UtilityTransaction, ids: readonly string[]) {
  return tx.rows(
    z.object({ id: z.uuid(), name: z.string(), model: z.unknown(), source: z.string(), standing: z.string() }),
    'select id, name, model, source, standing from damper_types where id = any(:ids::uuid[])',
    { ids },
  );
}

export function selectClimate(tx: UtilityTransaction, climateId: string) {
  return tx.first(
    z.object({ name: z.string(), source: z.string(), sectors: z.unknown() }),
    'select name, source, sectors from climates where id = :climateId',
    { climateId },
  );
}
