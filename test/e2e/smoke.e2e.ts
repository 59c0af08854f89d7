import { expect, test } from '@playwright/test';
import { stageUrl } from './support/stage-access';

test('a signed-out visitor of a deep link is asked to sign in, and told the address is kept', async ({
  page,
}) => {
  await page.goto(`${stageUrl()}/queue`);
  await expect(page.getByRole('heading', { name: /sign in/i })).toBeVisible();
  await expect(page).toHaveURL(/queue/);
});
