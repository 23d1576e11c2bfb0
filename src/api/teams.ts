import type { Page } from '#shared/contracts/common.ts';
import type {
  HistoryEvent,
  HistoryQuery,
  InvitationCreate,
  InvitationCreated,
  InvitationList,
  Member,
  MemberList,
  MemberUpdate,
  Team,
  TeamCreate,
  TeamUpdate,
} from '#shared/contracts/team.ts';
import { request } from './http.ts';

type BasedMember = Pick<Member, 'id' | 'revision'>;

export function createTeam(body: TeamCreate): Promise<Team> {
  return request({ method: 'POST', path: '/teams', body });
}

export function getTeam(teamId: string, signal?: AbortSignal): Promise<Team> {
  return request({ method: 'GET', path: `/teams/${teamId}`, signal });
}

export function updateTeam(based: Pick<Team, 'id' | 'revision'>, body: TeamUpdate): Promise<Team> {
  return request({ method: 'PUT', path: `/teams/${based.id}`, body, ifMatch: based.revision });
}

export function listMembers(teamId: string, signal?: AbortSignal): Promise<MemberList> {
  return request({ method: 'GET', path: `/teams/${teamId}/members`, signal });
}

export function updateMember(teamId: string, based: BasedMember, body: MemberUpdate): Promise<Member> {
  const path = `/teams/${teamId}/members/${based.id}`;
  return request({ method: 'PUT', path, body, ifMatch: based.revision });
}

export function removeMember(teamId: string, based: BasedMember): Promise<void> {
  const path = `/teams/${teamId}/members/${based.id}`;
  return request({ method: 'DELETE', path, ifMatch: based.revision });
}

export function listInvitations(teamId: string, signal?: AbortSignal): Promise<InvitationList> {
  return request({ method: 'GET', path: `/teams/${teamId}/invitations`, signal });
}

export function createInvitation(teamId: string, body: InvitationCreate): Promise<InvitationCreated> {
  return request({ method: 'POST', path: `/teams/${teamId}/invitations`, body });
}

export function withdrawInvitation(teamId: string, invitationId: string): Promise<void> {
  return request({ method: 'DELETE', path: `/teams/${teamId}/invitations/${invitationId}` });
}

export function listHistory(
  teamId: string,
  query: HistoryQuery,
  signal?: AbortSignal,
): Promise<Page<HistoryEvent>> {
  return request({ method: 'GET', path: `/teams/${teamId}/history`, query, signal });
}
