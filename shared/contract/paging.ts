import { z } from 'zod';

export const idSchema = z
  .uuid()
  .meta({ description: 'Identifier (UUID)', examples: ['0198d3c2-7a50-7000-8000-000000000001'] });
export const instantSchema = z.iso.datetime({ offset: true }).describe('Instant, ISO 8601 with zone');
export const versionNumberSchema = z.number().int().min(1).describe('Version of the record; send it back in If-Match');

/** Query keys of every paged list. */
export const pageQuery = {
  limitCount: z.coerce.number().int().min(1).max(500).default(50).describe('Rows a page'),
  cursor: z.string().max(400).optional().describe('`nextCursor` of the page before'),
};

/** A page of a list; `nextCursor` is null on the last page. */
export function pageOf<T extends z.ZodType>(item: T) {
  return z.object({ items: z.array(item), nextCursor: z.string().nullable(), totalCount: countOrNull });
}
const countOrNull = z.number().int().nullable().describe('Rows in all, where counting is cheap enough');

/** A query key that may be given as `true` or `false`. */
export const booleanQuery = z.enum(['true', 'false']).transform((text) => text === 'true');

/** A query key that lists values separated by commas. */
export function listQuery<T extends z.ZodType>(item: T) {
  return z
    .string()
    .max(4000)
    .transform((text, context): z.infer<T>[] => {
      const parts = text.split(',').filter((part) => part !== '');
      const parsed = z.array(item).max(100).safeParse(parts);
      if (parsed.success) return parsed.data;
      for (const issue of parsed.error.issues) context.addIssue({ code: 'custom', message: issue.message });
      return z.NEVER;
    });
}
