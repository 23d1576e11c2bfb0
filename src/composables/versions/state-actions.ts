import { type Role, hasPermission } from '#shared/contracts/roles.ts';
import type { VersionState } from '#shared/contracts/spec.ts';

export type StateAction = 'put on trial' | 'back to draft' | 'lock' | 'retire' | 'unlock';

/** What each action needs, and the states it starts from. The server decides; this only hides what it would refuse. */
const ACTIONS: readonly {
  action: StateAction;
  permission: 'edit-specs' | 'lock' | 'unlock';
  from: readonly VersionState[];
}[] = [
  { action: 'put on trial', permission: 'edit-specs', from: ['draft'] },
  { action: 'back to draft', permission: 'edit-specs', from: ['on trial'] },
  { action: 'lock', permission: 'lock', from: ['draft', 'on trial'] },
  { action: 'retire', permission: 'lock', from: ['draft', 'on trial', 'locked'] },
  { action: 'unlock', permission: 'unlock', from: ['locked'] },
];

/** Actions a member with these roles may take on a version in this state, in the order they are offered. */
export function stateActionsFor(state: VersionState, roles: readonly Role[]): StateAction[] {
  return ACTIONS.filter(
    ({ permission, from }) => from.includes(state) && hasPermission(roles, permission),
  ).map(({ action }) => action);
}
