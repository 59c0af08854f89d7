import { GetObjectCommand, ListObjectsV2Command, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { createConnection, type RowDataPacket } from 'mysql2/promise';
import { createTransport } from 'nodemailer';
import { afterAll, describe, expect, inject, it } from 'vitest';
import { type ReceivedMail } from '../../../server/fakes/mailbox';
import { createEmptyDatabase } from '../../support/database';

const services = inject('services');

describe('the services of a test run', () => {
  const { store } = services;
  const client = new S3Client({
    endpoint: store.endpoint,
    region: store.region,
    forcePathStyle: true,
    credentials: { accessKeyId: store.accessKeyId, secretAccessKey: store.secretAccessKey },
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  });

  afterAll(() => {
    client.destroy();
  });

  it('give a database of its own that speaks UTC and the whole of Unicode', async () => {
    const database = await createEmptyDatabase(services);
    const connection = await createConnection({ uri: database.url, charset: 'utf8mb4_unicode_ci' });
    await connection.query('CREATE TABLE t (word VARCHAR(20))');
    await connection.query('INSERT INTO t VALUES (?)', ['åäö 🏋']);
    const [rows] = await connection.query<RowDataPacket[]>(
      'SELECT word, TIMESTAMPDIFF(SECOND, UTC_TIMESTAMP(), NOW()) AS secondsFromUtc FROM t',
    );
    expect(rows).toEqual([{ word: 'åäö 🏋', secondsFromUtc: 0 }]);
    await connection.end();
    await database.drop();
  });

  it('give a store that keeps objects and lists more keys than one page holds', async () => {
    const { bucket: Bucket } = store;
    for (const Key of ['pages/1', 'pages/2', 'pages/3'])
      await client.send(new PutObjectCommand({ Bucket, Key, Body: Key }));
    const first = await client.send(new ListObjectsV2Command({ Bucket, Prefix: 'pages/', MaxKeys: 2 }));
    expect(first.IsTruncated).toBe(true);
    const rest = await client.send(
      new ListObjectsV2Command({ Bucket, Prefix: 'pages/', ContinuationToken: first.NextContinuationToken }),
    );
    expect(rest.Contents?.map((object) => object.Key)).toEqual(['pages/3']);
    const object = await client.send(new GetObjectCommand({ Bucket, Key: 'pages/2' }));
    expect(await object.Body?.transformToString()).toBe('pages/2');
  });

  it('give a mail service whose mailbox shows what was sent', async () => {
    const transport = createTransport(services.mail.smtpUrl, { from: 'desk@ironbirch.example' });
    await transport.sendMail({ to: 'mira@ironbirch.example', subject: 'Välkommen', text: 'Hello Mira' });
    transport.close();
    const response = await fetch(services.mail.mailboxUrl);
    const { items } = (await response.json()) as { items: ReceivedMail[] };
    expect(items[0]).toMatchObject({
      to: 'mira@ironbirch.example',
      subject: 'Välkommen',
      text: 'Hello Mira\n',
    });
  });
});
