import { z } from 'zod';

/** What a person may do; claims of the identity provider decide, one person may hold several. */
export const roles = ['engineer', 'crew', 'manager', 'safety-officer', 'admin'] as const;
export const roleSchema = z.enum(roles);
export type Role = z.infer<typeof roleSchema>;
