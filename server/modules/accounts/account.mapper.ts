import type { Account } from '#shared/contracts/account.ts';

import type { PersonWithTeams } from './account.queries.ts';

export function toAccount({ user, teams }: PersonWithTeams): Account {
  return {
    id: user.id,
    email: user.email,
    name: user.name,
    teams: teams.map(({ teamId, teamName, roles }) => ({ teamId, teamName, roles: [...roles] })),
  };
}
