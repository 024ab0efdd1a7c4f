import { readFileSync } from 'node:fs';
import { z } from 'zod';

const personSchema = z.object({
  sub: z.string(),
  name: z.string(),
  email: z.email(),
  utility: z.string(),
  roles: z.array(z.string()),
});
export type DemoPerson = z.infer<typeof personSchema>;

/** The people of the demo, as the fake provider offers them. */
export const demoPeople: readonly DemoPerson[] = z
  .array(personSchema)
  .parse(JSON.parse(readFileSync(new URL('./people.json', import.meta.url), 'utf8')));
