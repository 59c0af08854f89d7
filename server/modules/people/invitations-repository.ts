import type { InvitationDto, Role } from '../../contract';
import type { Database, Transaction } from '../../platform/database';

type Db = Database | Transaction;

export interface Invitation extends InvitationDto {
  readonly gymId: string;
  readonly withdrawn: boolean;
}

interface Row {
  id: string;
  gym_id: string;
  email: string;
  name: string;
  role: Role;
  gym_name: string;
  inviter: string;
  created_at: Date;
  expires_at: Date;
  accepted_at: Date | null;
  withdrawn_at: Date | null;
}

const toInvitation = (row: Row): Invitation => ({
  id: row.id,
  gymId: row.gym_id,
  email: row.email,
  name: row.name,
  role: row.role,
  gymName: row.gym_name,
  invitedBy: row.inviter,
  createdAt: row.created_at.toISOString(),
  expiresAt: row.expires_at.toISOString(),
  acceptedAt: row.accepted_at?.toISOString() ?? null,
  withdrawn: row.withdrawn_at !== null,
});

const invitations = (db: Db) =>
  db('invitations')
    .join('gyms', 'gyms.id', 'invitations.gym_id')
    .join('users', (on) =>
      on.on('users.gym_id', 'invitations.gym_id').andOn('users.id', 'invitations.invited_by'),
    )
    .select('invitations.*', 'gyms.name as gym_name', 'users.name as inviter');

/** The token is the key here: who holds it is told the gym, so no gym id is asked for. */
export async function findByToken(db: Db, tokenHash: Buffer, lock = false): Promise<Invitation | null> {
  const query = invitations(db).where('invitations.token_hash', tokenHash).first();
  const row: Row | undefined = await (lock ? query.forUpdate() : query);
  return row ? toInvitation(row) : null;
}

export async function listOpen(db: Db, gymId: string, now: Date): Promise<Invitation[]> {
  const rows: Row[] = await invitations(db)
    .where('invitations.gym_id', gymId)
    .whereNull('invitations.accepted_at')
    .whereNull('invitations.withdrawn_at')
    .andWhere('invitations.expires_at', '>', now)
    .orderBy('invitations.created_at', 'desc');
  return rows.map(toInvitation);
}

export interface NewInvitationRow {
  readonly id: string;
  readonly gymId: string;
  readonly tokenHash: Buffer;
  readonly email: string;
  readonly name: string;
  readonly role: Role;
  readonly invitedBy: string;
  readonly expiresAt: Date;
}

export async function insertInvitation(trx: Transaction, row: NewInvitationRow, now: Date): Promise<void> {
  await trx('invitations').insert({
    id: row.id,
    gym_id: row.gymId,
    token_hash: row.tokenHash,
    email: row.email,
    name: row.name,
    role: row.role,
    invited_by: row.invitedBy,
    created_at: now,
    expires_at: row.expiresAt,
  });
}

/** Withdraws what is open: one invitation by id, or all to an address. @returns how many */
export async function withdrawOpen(
  db: Db,
  gymId: string,
  which: { id: string } | { email: string },
  now: Date,
): Promise<number> {
  return db('invitations')
    .where({ gym_id: gymId, ...which })
    .whereNull('accepted_at')
    .whereNull('withdrawn_at')
    .update({ withdrawn_at: now });
}

export async function setAccepted(trx: Transaction, gymId: string, id: string, now: Date): Promise<void> {
  await trx('invitations').where({ gym_id: gymId, id }).update({ accepted_at: now });
}

/** Deletes the invitations that carried an address. */
export async function deleteInvitations(trx: Transaction, gymId: string, email: string): Promise<void> {
  await trx('invitations').where({ gym_id: gymId, email }).delete();
}
