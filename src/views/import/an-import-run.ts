import type { ImportRun } from '#shared/contract/imports.ts';
import { anId } from '#src/components/drawing/a-section.ts';

/** Test builder: a surveyed file that was imported without a fault. */
export function anImportRun(overrides: Partial<ImportRun> = {}): ImportRun {
  return {
    id: anId(61),
    fileName: 'lines.csv',
    options: { kind: 'surveyed', format: 'csv', isDryRun: false },
    state: 'done',
    step: 'ended',
    doneCount: 5,
    totalCount: 5,
    counts: {
      lineCount: 1,
      sectionCount: 2,
      structureCount: 6,
      spanCount: 5,
      wireCount: 8,
      spanWireCount: 20,
      leftOutCount: 0,
    },
    errors: [],
    errorCount: 0,
    notices: [],
    extentDeg: [-21.2, -38.6, -21, -38.4],
    createdByName: 'Ines Halvorsen',
    createdAt: '2026-03-01T10:00:00Z',
    endedAt: '2026-03-01T10:00:05Z',
    ...overrides,
  };
}
