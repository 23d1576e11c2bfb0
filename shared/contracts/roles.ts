import { Type } from '@sinclair/typebox';

import { oneOf } from './common.ts';

/** The five roles a member of a team may hold, several at once. */
export const ROLES = ['manager', 'developer', 'trainer', 'menu-writer', 'bartender'] as const;
export type Role = (typeof ROLES)[number];

export const RoleSchema = oneOf(ROLES);
export const RolesSchema = Type.Array(RoleSchema, { minItems: 1, maxItems: ROLES.length, uniqueItems: true });

/** What may be done in a team. A route asks for one of these; the table below says who holds it. */
export const PERMISSIONS = [
  'read',
  'taste',
  'edit-ingredients',
  'edit-specs',
  'see-costs',
  'lock',
  'unlock',
  'manage-team',
  'read-history',
] as const;
export type Permission = (typeof PERMISSIONS)[number];

const GRANTS: Readonly<Record<Permission, readonly Role[]>> = {
  read: ROLES,
  taste: ROLES,
  'edit-ingredients': ['developer', 'manager'],
  'edit-specs': ['developer', 'manager'],
  'see-costs': ['developer', 'menu-writer', 'manager'],
  lock: ['menu-writer', 'manager'],
  unlock: ['manager'],
  'manage-team': ['manager'],
  'read-history': ['manager'],
};

/** Whether any of a member's roles grants the permission. */
export function hasPermission(roles: readonly Role[], permission: Permission): boolean {
  return roles.some((role) => GRANTS[permission].includes(role));
}
