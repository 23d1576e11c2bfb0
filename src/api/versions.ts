import type {
  Note,
  NoteList,
  NoteWrite,
  Version,
  VersionList,
  VersionRetire,
  VersionStateChange,
} from '#shared/contracts/version.ts';
import { request } from './http.ts';

function versionPath(teamId: string, versionId: string): string {
  return `/teams/${teamId}/versions/${versionId}`;
}

/** A version with the revision an action on it was based on. */
type Based = Pick<Version, 'id' | 'revision'>;

/** All versions of a spec, newest first. */
export function listVersionsOfSpec(teamId: string, specId: string): Promise<VersionList> {
  return request({ method: 'GET', path: `/teams/${teamId}/specs/${specId}/versions` });
}

/** Some versions, of one spec or several, in the order asked for. */
export function listVersionsById(teamId: string, versionIds: readonly string[]): Promise<VersionList> {
  return request({
    method: 'GET',
    path: `/teams/${teamId}/versions`,
    query: { ids: versionIds.join(',') },
  });
}

export function getVersion(teamId: string, versionId: string): Promise<Version> {
  return request({ method: 'GET', path: versionPath(teamId, versionId) });
}

export function changeVersionState(teamId: string, based: Based, body: VersionStateChange): Promise<Version> {
  const path = `${versionPath(teamId, based.id)}/state`;
  return request({ method: 'POST', path, body, ifMatch: based.revision });
}

export function retireVersion(teamId: string, based: Based, body: VersionRetire): Promise<Version> {
  const path = `${versionPath(teamId, based.id)}/retire`;
  return request({ method: 'POST', path, body, ifMatch: based.revision });
}

export function lockVersion(teamId: string, based: Based): Promise<Version> {
  const path = `${versionPath(teamId, based.id)}/lock`;
  return request({ method: 'POST', path, body: { confirmed: true }, ifMatch: based.revision });
}

export function unlockVersion(teamId: string, based: Based, reason: string): Promise<Version> {
  const path = `${versionPath(teamId, based.id)}/unlock`;
  return request({ method: 'POST', path, body: { reason }, ifMatch: based.revision });
}

export function listNotes(teamId: string, versionId: string): Promise<NoteList> {
  return request({ method: 'GET', path: `${versionPath(teamId, versionId)}/notes` });
}

export function addNote(teamId: string, versionId: string, body: NoteWrite): Promise<Note> {
  return request({ method: 'POST', path: `${versionPath(teamId, versionId)}/notes`, body });
}

export function updateNote(teamId: string, note: Note, body: NoteWrite): Promise<Note> {
  const path = `${versionPath(teamId, note.versionId)}/notes/${note.id}`;
  return request({ method: 'PUT', path, body, ifMatch: note.revision });
}

export function deleteNote(teamId: string, note: Note): Promise<void> {
  const path = `${versionPath(teamId, note.versionId)}/notes/${note.id}`;
  return request({ method: 'DELETE', path, ifMatch: note.revision });
}
