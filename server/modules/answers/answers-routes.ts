import { boardRoutes, takeRoutes } from '../../contract';
import type { Routes } from '../../platform/http/routes';
import type { AnswersService } from './answers-service';
import type { BoardService } from './board-service';

/** The board and what comes of it. */
export interface Answers {
  readonly board: BoardService;
  readonly answers: AnswersService;
}

export function registerAnswersRoutes(routes: Routes, { board, answers }: Answers): void {
  routes.guarded(boardRoutes.getBoard, ({ actor, params }) => board.board(actor, params.id));
  routes.guarded(boardRoutes.addComment, ({ actor, params, body }) =>
    board.addComment(actor, params.id, body),
  );
  routes.guarded(boardRoutes.changeComment, ({ actor, params, body }) =>
    board.changeComment(actor, params.id, body),
  );
  routes.guarded(boardRoutes.deleteComment, async ({ actor, params }) => {
    await board.deleteComment(actor, params.id);
    return undefined;
  });
  routes.guarded(boardRoutes.putMarks, ({ actor, params, body }) => board.putMarks(actor, params.id, body));
  routes.guarded(boardRoutes.addMeasure, ({ actor, params, body }) =>
    board.addMeasure(actor, params.id, body),
  );
  routes.guarded(boardRoutes.deleteMeasure, async ({ actor, params }) => {
    await board.deleteMeasure(actor, params.id);
    return undefined;
  });
  routes.guarded(boardRoutes.putRepMarks, ({ actor, params, body }) =>
    board.putRepMarks(actor, params.id, body.marks),
  );
  routes.guarded(boardRoutes.putDraft, ({ actor, params, body }) => board.putDraft(actor, params.id, body));
  routes.guarded(boardRoutes.sendAnswer, ({ actor, params, body }) => answers.send(actor, params.id, body));
  routes.guarded(boardRoutes.addReply, ({ actor, params, body }) =>
    answers.reply(actor, params.id, body.body),
  );
  routes.stream(takeRoutes.getCaptions, async ({ actor, params, query, res }) => {
    const captions = await answers.captions(actor, params.id, query.view);
    res
      .set({ 'Cache-Control': 'private, no-cache', 'X-Content-Type-Options': 'nosniff' })
      .type('text/vtt; charset=utf-8')
      .send(captions);
  });
}
