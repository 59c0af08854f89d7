export { isUnderage } from './age';
export { createInvitations, type Invitations } from './invitations-service';
export { mustBeGoodPassword } from './password-rules';
export {
  contactOf,
  emailIsTaken,
  findUser,
  insertUser,
  membersOf,
  names,
  passwordHashOf,
  staffOf,
  updateUser,
} from './people-repository';
export { registerPeopleRoutes } from './people-routes';
export { createPeople, mustNotBeLastOwner, type People } from './people-service';
