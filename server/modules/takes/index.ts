export { clipDto } from './clip-dto';
export { clipsOfTakes, type ClipRow } from './take-clips-repository';
export { takeDtos, takeDtosByIds } from './take-dtos';
export { clipUnplayable, clipsReady, lockedTake, tellTake, wordsFor } from './take-flow';
export { holderOf, type TakeRow } from './take-row';
export { loadVisible, mayBeSeen } from './take-visibility';
export { allTakesOf, deleteTakesOf, handedInTakes, lockTake, setAnswered } from './takes-repository';
export { registerTakesRoutes } from './takes-routes';
export { createTakes, type TakesDeps, type TakesService } from './takes-service';
