import { readConfig } from './config';
import { migrateToLatest, openDatabase } from './database';

const database = openDatabase(readConfig(process.env).databaseUrl, 2);
try {
  await migrateToLatest(database);
} finally {
  await database.destroy();
}
