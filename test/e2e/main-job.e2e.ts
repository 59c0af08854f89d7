import { expect, test } from '@playwright/test';
import { phoneClip } from './support/phone-clips';
import { signIn } from './support/pages';
import { makeWorld } from './support/world';

test('a member films what is asked', async ({ browser }) => {
  const world = await makeWorld();
  const phone = await browser.newContext({
    viewport: { width: 390, height: 844 },
    hasTouch: true,
    isMobile: true,
  });
  const page = await phone.newPage();
  await signIn(page, world.member);
  await expect(page).toHaveURL(/today/);
  await page.getByRole('button', { name: 'I have read this' }).click();
  await page.getByRole('link', { name: /film/i }).first().click();
  await expect(page).toHaveURL(/filming/);
  await expect(page.getByLabel('Choose the front clip')).toBeAttached();
  await page.getByLabel('Choose the front clip').setInputFiles(await phoneClip('phone-front.mov'));
  await page.getByLabel('Choose the side clip').setInputFiles(await phoneClip('phone-side.mov'));
  await expect(page.getByRole('button', { name: 'Send to your coach' })).toBeEnabled({ timeout: 60_000 });
  await page.getByRole('button', { name: 'Send to your coach' }).click();
  await expect(page.getByRole('heading', { name: 'You can put the phone away.' })).toBeVisible();
});
