import { NOTE_SCALES, type Note, type NoteScale, type NoteWrite } from '../contracts/version.ts';

/** Mean of the scores that were given on one scale, with how many there were. */
export interface ScaleSummary {
  scale: NoteScale;
  count: number;
  /** null when nobody scored it: no score is not a score of 0. */
  mean: number | null;
}

/** One summary a scale, in the order the scales are always shown. */
export function summariseNotes(notes: readonly Pick<Note, 'scores'>[]): ScaleSummary[] {
  return NOTE_SCALES.map((scale) => {
    const scores = notes.map((note) => note.scores[scale]).filter((score) => score !== null);
    const sum = scores.reduce((total, score) => total + score, 0);
    return { scale, count: scores.length, mean: scores.length === 0 ? null : sum / scores.length };
  });
}

export function emptyNote(): NoteWrite {
  return {
    scores: { sweet: null, sour: null, bitter: null, strength: null, texture: null, overall: null },
    words: '',
  };
}

/** Whether a note says anything at all: a score or a word. */
export function isNoteWritten(note: NoteWrite): boolean {
  return note.words.trim() !== '' || NOTE_SCALES.some((scale) => note.scores[scale] !== null);
}
