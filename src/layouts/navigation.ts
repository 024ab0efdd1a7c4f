import type { Role } from '#shared/contract/roles.ts';

export interface NavigationEntry {
  readonly path: string;
  readonly label: string;
  /** Roles that see it; left out, everybody does. */
  readonly roles?: readonly Role[];
}

const riskReaders = ['engineer', 'manager', 'safety-officer', 'admin'] as const;

const entries: readonly NavigationEntry[] = [
  { path: '/', label: 'Map' },
  { path: '/risk', label: 'Risk table', roles: riskReaders },
  { path: '/assessments', label: 'Assessments' },
  { path: '/alerts', label: 'Alerts', roles: riskReaders },
  { path: '/field', label: 'Field log', roles: ['crew', 'engineer'] },
  { path: '/catalogue/conductors', label: 'Catalogue' },
  { path: '/import', label: 'Import', roles: ['engineer'] },
  { path: '/admin', label: 'Admin', roles: ['admin'] },
  { path: '/help', label: 'Help' },
];

/** The pages that a person may open, in the order of the navigation. */
export function navigationFor(roles: readonly Role[]): NavigationEntry[] {
  return entries.filter((entry) => entry.roles === undefined || entry.roles.some((role) => roles.includes(role)));
}
