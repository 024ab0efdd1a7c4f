import { z } from 'zod';

/** Grades of a span wire, section or line, least to worst; a section or line takes the worst of its members. */
export const grades = ['calm', 'notice', 'act', 'urgent'] as const;
export const gradeSchema = z.enum(grades).describe('Grade, least to worst: calm, notice, act, urgent');
export type Grade = z.infer<typeof gradeSchema>;

/** The letter that stands beside every grade, so that it is never told by colour alone. */
export const gradeLetters = { calm: 'C', notice: 'N', act: 'A', urgent: 'U' } as const satisfies Record<Grade, string>;

/** Number that orders grades: 0 calm … 3 urgent. */
export function gradeRankIndex(grade: Grade): number {
  return grades.indexOf(grade);
}

/** The worst of some grades; null when none of them is assessed. */
export function worstGrade(among: readonly (Grade | null)[]): Grade | null {
  return among.reduce<Grade | null>(
    (worst, grade) =>
      grade !== null && (worst === null || gradeRankIndex(grade) > gradeRankIndex(worst)) ? grade : worst,
    null,
  );
}
