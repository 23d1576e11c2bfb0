import type {
  Branch,
  DraftBody,
  DraftFromVersion,
  Spec,
  SpecCreate,
  SpecListQuery,
  SpecPage,
  SpecUpdate,
} from '#shared/contracts/spec.ts';
import type { Version, VersionCreate } from '#shared/contracts/version.ts';
import { request } from './http.ts';

function specsPath(teamId: string): string {
  return `/teams/${teamId}/specs`;
}

export function listSpecs(teamId: string, query: SpecListQuery, signal?: AbortSignal): Promise<SpecPage> {
  return request({ method: 'GET', path: specsPath(teamId), query, signal });
}

export function createSpec(teamId: string, body: SpecCreate): Promise<Spec> {
  return request({ method: 'POST', path: specsPath(teamId), body });
}

export function getSpec(teamId: string, specId: string, signal?: AbortSignal): Promise<Spec> {
  return request({ method: 'GET', path: `${specsPath(teamId)}/${specId}`, signal });
}

/** A change of the name or of what the spec is for; the draft has a guard of its own. */
type BasedSpec = Pick<Spec, 'id' | 'revision'>;

export function updateSpec(teamId: string, based: BasedSpec, body: SpecUpdate): Promise<Spec> {
  return request({ method: 'PUT', path: `${specsPath(teamId)}/${based.id}`, body, ifMatch: based.revision });
}

export function retireSpec(teamId: string, based: BasedSpec): Promise<Spec> {
  const path = `${specsPath(teamId)}/${based.id}/retire`;
  return request({ method: 'POST', path, ifMatch: based.revision });
}

export function restoreSpec(teamId: string, based: BasedSpec): Promise<Spec> {
  const path = `${specsPath(teamId)}/${based.id}/restore`;
  return request({ method: 'POST', path, ifMatch: based.revision });
}

/** A new variant that starts from a version. */
export function branchSpec(teamId: string, specId: string, body: Branch): Promise<Spec> {
  return request({ method: 'POST', path: `${specsPath(teamId)}/${specId}/branch`, body });
}

/** Puts a version's contents in place of the draft's. */
export function startDraftFromVersion(
  teamId: string,
  based: Pick<Spec, 'id' | 'draftRevision'>,
  body: DraftFromVersion,
): Promise<Spec> {
  const path = `${specsPath(teamId)}/${based.id}/draft/from-version`;
  return request({ method: 'POST', path, body, ifMatch: based.draftRevision });
}

/** Saves the working draft; a stale one is refused with the spec as it stands. */
export function saveDraft(
  teamId: string,
  based: Pick<Spec, 'id' | 'draftRevision'>,
  draft: DraftBody,
): Promise<Spec> {
  const path = `${specsPath(teamId)}/${based.id}/draft`;
  return request({ method: 'PUT', path, body: draft, ifMatch: based.draftRevision });
}

/** Saves the working draft as the next version. */
export function saveVersion(
  teamId: string,
  based: Pick<Spec, 'id' | 'draftRevision'>,
  body: VersionCreate,
): Promise<Version> {
  const path = `${specsPath(teamId)}/${based.id}/versions`;
  return request({ method: 'POST', path, body, ifMatch: based.draftRevision });
}
