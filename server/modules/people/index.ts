export { isUnderage } from './age';
export { createInvitations, type Invitations } from './invitations-service';
export { deleteInvitations } from './invitations-repository';
export { mustBeGoodPassword } from './password-rules';
export {
  anonymiseUser,
  contactOf,
  credentialsByEmail,
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
