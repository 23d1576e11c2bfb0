import { randomUUID } from 'node:crypto';

import type { EntityManager } from '@mikro-orm/postgresql';

import { NOTE_SCALES, type Note, type NoteWrite } from '#shared/contracts/version.ts';

import { problems } from '../../http/problems.ts';
import { flushBased, refuseStale } from '../../http/revision.ts';
import type { ActingContext } from '../../http/route.ts';
import { User } from '../accounts/account.entity.ts';
import { TastingNote } from './spec.entity.ts';
import { titleOf, toPersonRef } from './spec.mapper.ts';
import { recordSpecEvent } from './spec.service.ts';
import { loadVersion } from './version.queries.ts';

const NOTE_LIMIT = 500;

export async function readNotes({ em, teamId }: ActingContext, versionId: string): Promise<Note[]> {
  await loadVersion(em, { teamId, versionId });
  const where = { team: teamId, version: versionId };
  const notes = await em.find(TastingNote, where, {
    populate: ['author'],
    orderBy: { createdAt: 'desc', id: 'desc' },
    limit: NOTE_LIMIT,
  });
  return notes.map(toNote);
}

export async function addNote(
  context: ActingContext,
  { versionId, write }: { versionId: string; write: NoteWrite },
): Promise<Note> {
  const { em, teamId, person, now } = context;
  refuseEmpty(write);
  const version = await loadVersion(em, { teamId, versionId });
  const note = em.create(TastingNote, {
    id: randomUUID(),
    team: teamId,
    version,
    author: em.getReference(User, person.id),
    scores: scoresOf(write),
    words: write.words.trim(),
    createdAt: now(),
    updatedAt: now(),
  });
  const summary = `Noted a tasting of ${titleOf(version.spec)} version ${version.number}`;
  recordSpecEvent(context, { spec: version.spec, action: 'note.added', summary });
  await em.flush();
  return toNote(
    await loadNote(em.fork({ keepTransactionContext: true }), { teamId, versionId, noteId: note.id }),
  );
}

interface OwnNote {
  versionId: string;
  noteId: string;
  ifMatch: number;
}

export async function changeNote(
  context: ActingContext,
  { write, ...own }: OwnNote & { write: NoteWrite },
): Promise<Note> {
  refuseEmpty(write);
  const note = await loadOwnNote(context, own);
  note.scores = scoresOf(write);
  note.words = write.words.trim();
  await flushNote(context, own);
  return toNote(note);
}

export async function deleteNote(context: ActingContext, own: OwnNote): Promise<void> {
  const note = await loadOwnNote(context, own);
  context.em.remove(note);
  const { spec, number } = note.version;
  const summary = `Removed an own tasting note on ${titleOf(spec)} version ${number}`;
  recordSpecEvent(context, { spec, action: 'note.removed', summary });
  await flushNote(context, own);
}

function flushNote({ em, teamId }: ActingContext, own: OwnNote): Promise<void> {
  return flushBased(em, async (fresh) => toNote(await loadNote(fresh, { teamId, ...own })));
}

/** Anyone may read a note; only who wrote it may change it. */
async function loadOwnNote({ em, teamId, person }: ActingContext, own: OwnNote): Promise<TastingNote> {
  const note = await loadNote(em, { teamId, ...own });
  if (note.author?.id !== person.id)
    throw problems.forbidden('Only the person who wrote a note may change it.');
  refuseStale(note, { ifMatch: own.ifMatch, current: () => toNote(note) });
  return note;
}

async function loadNote(
  em: EntityManager,
  { teamId, versionId, noteId }: { teamId: string; versionId: string; noteId: string },
): Promise<TastingNote> {
  const where = { id: noteId, team: teamId, version: versionId };
  const note = await em.findOne(TastingNote, where, { populate: ['author', 'version.spec'] });
  if (note === null) throw problems.notFound('note', noteId);
  return note;
}

function refuseEmpty(write: NoteWrite): void {
  const isEmpty = write.words.trim() === '' && NOTE_SCALES.every((scale) => write.scores[scale] === null);
  if (isEmpty) throw problems.invalidField('#/words', 'empty', 'Give at least one score or some words.');
}

function scoresOf({ scores }: NoteWrite): NoteWrite['scores'] {
  const { sweet, sour, bitter, strength, texture, overall } = scores;
  return { sweet, sour, bitter, strength, texture, overall };
}

function toNote(note: TastingNote): Note {
  return {
    id: note.id,
    revision: note.revision,
    versionId: note.version.id,
    author: toPersonRef(note.author),
    scores: scoresOf(note),
    words: note.words,
    createdAt: note.createdAt.toISOString(),
    updatedAt: note.updatedAt.toISOString(),
  };
}
