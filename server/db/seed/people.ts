import type { Role } from '#shared/contracts/roles.ts';

export interface DemoPerson {
  email: string;
  password: string;
  name: string;
  roles: Role[];
}

/** People of the demo team: roles, not persons. Their passwords are printed at every start and are no secret. */
export const DEMO_PEOPLE = {
  manager: person('manager', 'Manager'),
  developer: person('developer', 'Bar developer'),
  trainer: person('trainer', 'Trainer'),
  menuWriter: person('menu-writer', 'Menu writer'),
  bartender: person('bartender', 'Bartender'),
} as const;

export type DemoPersonKey = keyof typeof DEMO_PEOPLE;

function person(role: Role, name: string): DemoPerson {
  return { email: `${role}@example.test`, password: `gannet-${role}`, name, roles: [role] };
}
