import { expect, test, type Page } from '@playwright/test';
import { writeFile } from 'node:fs/promises';
import { signIn } from './support/pages';
import { stageUrl } from './support/stage-access';
import { filmedTake, makeWorld, type Person } from './support/world';

async function giveForm(page: Page, person: Person): Promise<void> {
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password', { exact: true }).fill(person.password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
}

test('a signed-out visitor of a deep link signs in and is where the link led', async ({ page }) => {
  const { coach, lift } = await makeWorld();
  await page.goto(`${stageUrl()}/lifts/${lift.id}`);
  await giveForm(page, coach);
  await expect(page.getByRole('heading', { name: 'Goblet squat' })).toBeVisible();
  await expect(page).toHaveURL(new RegExp(`/lifts/${lift.id}`));
});

test('a draft on the board outlives a session that ends in the middle', async ({ page }) => {
  const { coach, member, assignment } = await makeWorld();
  const take = await filmedTake(member, assignment.id);
  await signIn(page, coach);
  await page.goto(`${stageUrl()}/board/${take.id}`);
  await expect(page.getByLabel('The one thing to change')).toBeEditable();

  await test.step('the session ends while the coach writes', async () => {
    // Every session of the coach is ended from another device.
    const { items } = await coach.api.get<{ items: { id: string; current: boolean }[] }>('/api/me/sessions');
    for (const session of items.filter((one) => !one.current)) {
      await coach.api.ok('DELETE', `/api/me/sessions/${session.id}`);
    }
    await page.getByLabel('The one thing to change').fill('Leave two full footprints all the way down');
    await expect(page).toHaveURL(/\/sign-in/, { timeout: 30_000 });
  });

  await test.step('after signing in again the words are there', async () => {
    await giveForm(page, coach);
    await expect(page).toHaveURL(new RegExp(`/board/${take.id}`));
    await expect(page.getByLabel('The one thing to change')).toHaveValue(
      'Leave two full footprints all the way down',
    );
  });
});

test('a colleague sees who has a take, and gets it when it is put back', async ({ browser }) => {
  const { coach, owner, member, assignment } = await makeWorld();
  const take = await filmedTake(member, assignment.id);
  const first = await (await browser.newContext()).newPage();
  const second = await (await browser.newContext()).newPage();
  await signIn(first, coach);
  await first.goto(`${stageUrl()}/board/${take.id}`);
  await expect(first.getByLabel('The one thing to change')).toBeEditable();
  await signIn(second, owner);
  await second.goto(`${stageUrl()}/board/${take.id}`);
  await expect(
    second.getByText('Maren Oduya is answering this take. You can look, not write.'),
  ).toBeVisible();
  await second.getByRole('button', { name: 'Take it when it is free' }).click();
  await first.goto(`${stageUrl()}/queue`);
  await expect(second.getByLabel('The one thing to change')).toBeEditable({ timeout: 30_000 });
});

test('a file that is no video is refused beside its slot, and the other clip stays', async ({
  page,
}, info) => {
  const { member, assignment } = await makeWorld();
  await signIn(page, member);
  await page.getByRole('button', { name: 'I have read this' }).click();
  await page.goto(`${stageUrl()}/filming/${assignment.id}`);
  const text = info.outputPath('squat.mp4');
  await writeFile(text, '#EXTM3U\n#EXTINF:1,\nfile:///etc/passwd\n'.repeat(200));
  await page.getByLabel('Choose the front clip').setInputFiles(text);
  const slot = page.locator('mf-clip-slot').first();
  await expect(slot.getByRole('alert')).toContainText(/video/i);
  await expect(page.getByRole('button', { name: 'Send to your coach' })).toBeDisabled();
});
