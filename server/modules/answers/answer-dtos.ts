import type { AnswerDto, BoardDto, CommentDto, MarkDto, MeasureDto, ReplyDto } from '../../contract/answers';
import type { Person } from '../../contract/common';
import { repTimings } from '../../calc/tempo';
import type { Database, Transaction } from '../../platform/database';
import { names } from '../people';
import { findAnswers, repliesOf, type ReplyRow } from './answers-repository';
import {
  commentsOf,
  marksOf,
  measuresOf,
  repMarksOf,
  type CommentRow,
  type MeasureRow,
} from './board-repository';

type Db = Database | Transaction;
/** Rep instants of one clip with the tempo that follows from them. */
export type RepMarksDto = BoardDto['repMarks'][number];
type People = ReadonlyMap<string, Person>;

const person = (people: People, id: string): Person => people.get(id) ?? { id, name: '' };

export const commentDto = (row: CommentRow, people: People): CommentDto => ({
  id: row.id,
  takeId: row.takeId,
  clipId: row.clipId,
  view: row.view,
  atMs: row.atMs,
  endMs: row.endMs,
  body: row.body,
  drawing: row.drawing,
  faultId: row.faultId,
  author: person(people, row.authorId),
  createdAt: row.createdAt.toISOString(),
});

export const measureDto = (row: MeasureRow, people: People): MeasureDto => ({
  id: row.id,
  takeId: row.takeId,
  clipId: row.clipId,
  atMs: row.atMs,
  kind: row.kind,
  points: row.points,
  faultId: row.faultId,
  value: row.value,
  plusMinus: row.plusMinus,
  unit: 'deg',
  author: person(people, row.authorId),
});

export const replyDto = (row: ReplyRow, people: People): ReplyDto => ({
  id: row.id,
  author: person(people, row.authorId),
  body: row.body,
  createdAt: row.createdAt.toISOString(),
});

const markDto = ({ faultId, mark, clipId, atMs }: MarkDto): MarkDto => ({ faultId, mark, clipId, atMs });

/** What coaches have put on the takes so far, whether sent or not. */
export interface BoardNotes {
  commentsOn(takeId: string): CommentDto[];
  marksOn(takeId: string): MarkDto[];
  measuresOn(takeId: string): MeasureDto[];
  readonly people: People;
}

/** Reads the notes on several takes at once. @param alsoNamed people whose names are wanted too */
export async function notesOn(
  db: Db,
  gymId: string,
  takeIds: readonly string[],
  alsoNamed: readonly string[] = [],
): Promise<BoardNotes> {
  const [comments, marks, measures] = await Promise.all([
    commentsOf(db, gymId, takeIds),
    marksOf(db, gymId, takeIds),
    measuresOf(db, gymId, takeIds),
  ]);
  const people = await names(db, gymId, [
    ...new Set([...comments, ...measures].map((row) => row.authorId).concat(alsoNamed)),
  ]);
  const on = <T extends { takeId: string }>(rows: readonly T[], takeId: string) =>
    rows.filter((row) => row.takeId === takeId);
  return {
    commentsOn: (takeId) => on(comments, takeId).map((row) => commentDto(row, people)),
    marksOn: (takeId) => on(marks, takeId).map(markDto),
    measuresOn: (takeId) => on(measures, takeId).map((row) => measureDto(row, people)),
    people,
  };
}

/** The answers sent to the takes, by take; takes without one are left out. */
export async function answersOf(
  db: Db,
  gymId: string,
  takeIds: readonly string[],
): Promise<ReadonlyMap<string, AnswerDto>> {
  const rows = await findAnswers(db, gymId, takeIds);
  const answered = rows.map((row) => row.takeId);
  if (answered.length === 0) return new Map();
  const replies = await repliesOf(db, gymId, answered);
  const notes = await notesOn(
    db,
    gymId,
    answered,
    [...rows, ...replies].map((row) => row.authorId),
  );
  return new Map(
    rows.map((row) => [
      row.takeId,
      {
        topCue: row.topCue,
        call: row.call,
        scale: row.scale,
        tempo: row.tempo,
        refilm: row.refilm,
        author: person(notes.people, row.authorId),
        answeredAt: row.answeredAt.toISOString(),
        comments: notes.commentsOn(row.takeId),
        marks: notes.marksOn(row.takeId),
        measures: notes.measuresOn(row.takeId),
        replies: replies
          .filter((reply) => reply.takeId === row.takeId)
          .map((reply) => replyDto(reply, notes.people)),
      },
    ]),
  );
}

/** Rep instants and the tempo that follows from them, for each of the clips. */
export async function repMarksDtos(
  db: Db,
  gymId: string,
  clipIds: readonly string[],
): Promise<RepMarksDto[]> {
  const rows = await repMarksOf(db, gymId, clipIds);
  return clipIds.map((clipId) => {
    const marks = rows.filter((row) => row.clipId === clipId).map(({ atMs, kind }) => ({ atMs, kind }));
    return { clipId, marks, tempo: repTimings(marks) };
  });
}
