import { Type } from '@sinclair/typebox';

import { Uuid } from '#shared/contracts/common.ts';
import { NoteListSchema, NoteSchema, NoteWriteSchema } from '#shared/contracts/version.ts';

import { type AnyRoute, inTeam, route } from '../../http/route.ts';
import { addNote, changeNote, deleteNote, readNotes } from './note.service.ts';

const tag = 'Notes';
const versionParams = Type.Object({ teamId: Uuid, versionId: Uuid });
const noteParams = Type.Object({ teamId: Uuid, versionId: Uuid, noteId: Uuid });

export const noteRoutes: AnyRoute[] = [
  route({
    operationId: 'listNotes',
    method: 'get',
    path: '/teams/:teamId/versions/:versionId/notes',
    summary: 'Tasting notes on a version, the newest first',
    tag,
    access: inTeam('read'),
    params: versionParams,
    response: { status: 200, schema: NoteListSchema },
    handler: async (context, { params }) => ({ body: { items: await readNotes(context, params.versionId) } }),
  }),
  route({
    operationId: 'addNote',
    method: 'post',
    path: '/teams/:teamId/versions/:versionId/notes',
    summary: 'Add a tasting note',
    tag,
    access: inTeam('taste'),
    params: versionParams,
    body: NoteWriteSchema,
    response: { status: 201, schema: NoteSchema },
    handler: async (context, { params, body }) => {
      const note = await addNote(context, { versionId: params.versionId, write: body });
      return { body: note, revision: note.revision };
    },
  }),
  route({
    operationId: 'updateNote',
    method: 'put',
    path: '/teams/:teamId/versions/:versionId/notes/:noteId',
    summary: 'Change one’s own note',
    tag,
    access: inTeam('taste'),
    params: noteParams,
    body: NoteWriteSchema,
    ifMatch: true,
    response: { status: 200, schema: NoteSchema },
    handler: async (context, { params: { versionId, noteId }, body, ifMatch }) => {
      const note = await changeNote(context, { versionId, noteId, write: body, ifMatch });
      return { body: note, revision: note.revision };
    },
  }),
  route({
    operationId: 'deleteNote',
    method: 'delete',
    path: '/teams/:teamId/versions/:versionId/notes/:noteId',
    summary: 'Remove one’s own note',
    tag,
    access: inTeam('taste'),
    params: noteParams,
    ifMatch: true,
    response: { status: 204, schema: null },
    handler: async (context, { params: { versionId, noteId }, ifMatch }) => {
      await deleteNote(context, { versionId, noteId, ifMatch });
      return {};
    },
  }),
];
