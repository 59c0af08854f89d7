import type { Platform } from '../../server/platform/platform';

/** The demo's gym of an earlier start, or null. */
export async function demoGymId({ database }: Platform, ownerEmail: string): Promise<string | null> {
  const row: { gym_id: string } | undefined = await database('users')
    .where('email', ownerEmail)
    .first('gym_id');
  return row?.gym_id ?? null;
}

/** Takes away what a cut-off start left of the demo: every row of its gym, its jobs, and its objects. */
export async function undoDemo({ database, store }: Platform, gymId: string): Promise<void> {
  await store.deletePrefix(`gyms/${gymId}/`);
  const tables: { name: string }[] = await database('information_schema.columns')
    .where({ column_name: 'gym_id', table_schema: database.client.config.connection.database })
    .select({ name: 'table_name' });
  await database.transaction(async (trx) => {
    // Rows of one gym point at each other in a ring; all of them go.
    await trx.raw('SET FOREIGN_KEY_CHECKS = 0');
    for (const { name } of tables) await trx(name).where('gym_id', gymId).delete();
    await trx('jobs').whereRaw("JSON_VALUE(payload, '$.gymId') = ?", [gymId]).delete();
    await trx('gyms').where('id', gymId).delete();
    await trx.raw('SET FOREIGN_KEY_CHECKS = 1');
  });
}
