import { ROLES, type Role } from '#shared/contracts/roles.ts';

export interface RoleWords {
  role: Role;
  label: string;
  /** What the role may do beyond reading and tasting notes, which everybody may. */
  may: string;
}

const WORDS: Readonly<Record<Role, Omit<RoleWords, 'role'>>> = {
  manager: {
    label: 'manager',
    may: 'Everything: also invites people, sets roles, undoes a lock with a reason, and reads the history.',
  },
  developer: {
    label: 'developer',
    may: 'Writes specs and ingredients, saves and branches versions, sees costs.',
  },
  trainer: { label: 'trainer', may: 'Reads every spec and writes tasting notes.' },
  'menu-writer': {
    label: 'menu writer',
    may: 'Signs and locks versions, retires them, sees costs.',
  },
  bartender: { label: 'bartender', may: 'Reads every spec and writes tasting notes.' },
};

/** The roles in their fixed order, in words. */
export const ROLE_WORDS: readonly RoleWords[] = ROLES.map((role) => ({ role, ...WORDS[role] }));

export function roleLabels(roles: readonly Role[]): string {
  return ROLES.filter((role) => roles.includes(role))
    .map((role) => WORDS[role].label)
    .join(', ');
}
