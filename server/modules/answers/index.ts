import type { Platform } from '../../platform/platform';
import type { Answers } from './answers-routes';
import { createAnswersService, type AnswersDeps } from './answers-service';
import { createBoard } from './board-service';

export { answersOf } from './answer-dtos';
export { registerAnswersRoutes, type Answers } from './answers-routes';

export function createAnswers(platform: Platform, deps: AnswersDeps): Answers {
  return { board: createBoard(platform), answers: createAnswersService(platform, deps) };
}
