import type { Person, Role, UserDto } from '../../contract';
import type { Database, Transaction } from '../../platform/database';
import { isUnderage } from './age';

type Db = Database | Transaction;

interface Row {
  id: string;
  gym_id: string;
  name: string;
  email: string;
  role: Role;
  active: 0 | 1;
  born_on: string | null;
  kit: string | null;
  guardian_name: string | null;
  guardian_consent_at: Date | null;
  created_at: Date;
  password_hash: string;
}

const toUser = (row: Row, now: Date): UserDto => ({
  id: row.id,
  gymId: row.gym_id,
  name: row.name,
  email: row.email,
  role: row.role,
  active: row.active === 1,
  bornOn: row.born_on,
  kit: row.kit,
  needsGuardianConsent: row.guardian_consent_at === null && isUnderage(row.born_on, now),
  guardianConsent:
    row.guardian_consent_at && row.guardian_name
      ? { guardianName: row.guardian_name, at: row.guardian_consent_at.toISOString() }
      : null,
  createdAt: row.created_at.toISOString(),
});

export async function findUser(db: Db, gymId: string, userId: string, now: Date): Promise<UserDto | null> {
  const row: Row | undefined = await db('users')
    .where({ gym_id: gymId, id: userId })
    .whereNull('erased_at')
    .first();
  return row ? toUser(row, now) : null;
}

export async function listUsers(db: Db, gymId: string, now: Date): Promise<UserDto[]> {
  const rows: Row[] = await db('users')
    .where({ gym_id: gymId })
    .whereNull('erased_at')
    .orderBy('name')
    .orderBy('id');
  return rows.map((row) => toUser(row, now));
}

/** Whether an address has an account, in whichever gym: one address is one account. */
export async function emailIsTaken(db: Db, email: string): Promise<boolean> {
  return (await db('users').where({ email }).first('id')) !== undefined;
}

export interface NewUser {
  readonly id: string;
  readonly gymId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly passwordHash: string;
  readonly bornOn: string | null;
}

export async function insertUser(trx: Transaction, user: NewUser, now: Date): Promise<void> {
  await trx('users').insert({
    id: user.id,
    gym_id: user.gymId,
    name: user.name,
    email: user.email,
    role: user.role,
    password_hash: user.passwordHash,
    born_on: user.bornOn,
    created_at: now,
  });
}

export interface UserChange {
  readonly name?: string;
  readonly kit?: string | null;
  readonly role?: Role;
  readonly active?: boolean;
  readonly passwordHash?: string;
}

/** Changes what is given; what is undefined stays. @returns whether the person is of this gym */
export async function updateUser(db: Db, gymId: string, userId: string, change: UserChange): Promise<void> {
  await db('users').where({ gym_id: gymId, id: userId }).update({
    name: change.name,
    kit: change.kit,
    role: change.role,
    active: change.active,
    password_hash: change.passwordHash,
    // One column is always set, so that an empty change is still a valid statement.
    gym_id: gymId,
  });
}

export async function setGuardianConsent(
  db: Db,
  gymId: string,
  userId: string,
  consent: { guardianName: string; recordedBy: string },
  now: Date,
): Promise<void> {
  await db('users').where({ gym_id: gymId, id: userId }).update({
    guardian_name: consent.guardianName,
    guardian_recorded_by: consent.recordedBy,
    guardian_consent_at: now,
  });
}

/** Active owners beside one person. */
export async function countOtherOwners(db: Db, gymId: string, userId: string): Promise<number> {
  const row = await db('users')
    .where({ gym_id: gymId, role: 'owner', active: true })
    .andWhereNot('id', userId)
    .count({ n: '*' })
    .first();
  return Number(row?.n ?? 0);
}

/** Names by id, of people of the gym who are or were. */
export async function names(db: Db, gymId: string, ids: readonly string[]): Promise<Map<string, Person>> {
  const wanted = [...new Set(ids)];
  if (wanted.length === 0) return new Map();
  const rows: Person[] = await db('users')
    .where({ gym_id: gymId })
    .whereIn('id', wanted)
    .select('id', 'name');
  return new Map(rows.map((row) => [row.id, row]));
}

/** Active coaches and owners. */
export async function staffOf(db: Db, gymId: string): Promise<Person[]> {
  return db('users')
    .where({ gym_id: gymId, active: true })
    .whereIn('role', ['coach', 'owner'])
    .select('id', 'name');
}

/** Active members; of the given ids when some are named. */
export async function membersOf(db: Db, gymId: string, ids?: readonly string[]): Promise<Person[]> {
  const query = db('users').where({ gym_id: gymId, active: true, role: 'member' }).orderBy('name');
  if (ids) query.whereIn('id', [...ids]);
  return query.select('id', 'name');
}

/** Where to write to an active person; null when there is nobody to write to. */
export async function contactOf(
  db: Db,
  gymId: string,
  userId: string,
): Promise<{ name: string; email: string } | null> {
  const row: { name: string; email: string } | undefined = await db('users')
    .where({ gym_id: gymId, id: userId, active: true })
    .whereNull('erased_at')
    .first('name', 'email');
  return row ?? null;
}

/** The stored hash of a person's password. */
export async function passwordHashOf(db: Db, gymId: string, userId: string): Promise<string | null> {
  const row: { password_hash: string } | undefined = await db('users')
    .where({ gym_id: gymId, id: userId })
    .first('password_hash');
  return row?.password_hash ?? null;
}

export interface Credentials {
  readonly gymId: string;
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly passwordHash: string;
}

/** The active account of an address, in whichever gym: one address is one account. */
export async function credentialsByEmail(db: Db, email: string): Promise<Credentials | null> {
  const row: { gym_id: string; id: string; name: string; email: string; password_hash: string } | undefined =
    await db('users')
      .where({ email: email.trim().toLowerCase(), active: true })
      .whereNull('erased_at')
      .first('gym_id', 'id', 'name', 'email', 'password_hash');
  return row
    ? {
        gymId: row.gym_id,
        userId: row.id,
        name: row.name,
        email: row.email,
        passwordHash: row.password_hash,
      }
    : null;
}

/** Leaves of a person only what the gym's records hang on: an id without a name, an address or a way in. */
export async function anonymiseUser(
  trx: Transaction,
  gymId: string,
  userId: string,
  name: string,
  now: Date,
): Promise<void> {
  await trx('users')
    .where({ gym_id: gymId, id: userId })
    .update({
      name,
      email: `erased-${userId}@erased.invalid`,
      active: false,
      password_hash: '',
      born_on: null,
      kit: null,
      guardian_name: null,
      guardian_consent_at: null,
      guardian_recorded_by: null,
      erased_at: now,
    });
}
