import type { Glass, GlassList, GlassWrite } from '#shared/contracts/glass.ts';
import { request } from './http.ts';

function glassesPath(teamId: string): string {
  return `/teams/${teamId}/glasses`;
}

type Based = Pick<Glass, 'id' | 'revision'>;

export function listGlasses(teamId: string): Promise<GlassList> {
  return request({ method: 'GET', path: glassesPath(teamId) });
}

export function createGlass(teamId: string, body: GlassWrite): Promise<Glass> {
  return request({ method: 'POST', path: glassesPath(teamId), body });
}

export function updateGlass(teamId: string, based: Based, body: GlassWrite): Promise<Glass> {
  return request({
    method: 'PUT',
    path: `${glassesPath(teamId)}/${based.id}`,
    body,
    ifMatch: based.revision,
  });
}

export function retireGlass(teamId: string, based: Based): Promise<Glass> {
  const path = `${glassesPath(teamId)}/${based.id}/retire`;
  return request({ method: 'POST', path, ifMatch: based.revision });
}

export function restoreGlass(teamId: string, based: Based): Promise<Glass> {
  const path = `${glassesPath(teamId)}/${based.id}/restore`;
  return request({ method: 'POST', path, ifMatch: based.revision });
}
