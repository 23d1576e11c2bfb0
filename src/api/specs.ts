import type { Spec, SpecCreate, SpecListQuery, SpecPage } from '#shared/contracts/spec.ts';
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
