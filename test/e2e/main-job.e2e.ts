import { expect, test, type Browser, type Page } from '@playwright/test';
import type { InvitationDto, TakeDetailDto } from '../../server/contract';
import { phoneClip } from './support/phone-clips';
import { signIn } from './support/pages';
import { stageUrl } from './support/stage-access';
import { PASSWORD, address, linkOf, mailTo, makeWorld } from './support/world';

const phone = (browser: Browser) =>
  browser.newContext({ viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true });

async function sendClips(page: Page, clips: Partial<Record<'front' | 'side', string>>): Promise<void> {
  for (const [view, file] of Object.entries(clips)) {
    await page.getByLabel(`Choose the ${view} clip`).setInputFiles(file);
  }
  const send = page.getByRole('button', { name: 'Send to your coach' });
  await expect(send).toBeEnabled({ timeout: 60_000 });
  await send.click();
  await expect(page.getByRole('heading', { name: 'You can put the phone away.' })).toBeVisible();
}

test('from an invitation to a refilm, with clips as phones write them', async ({ browser }) => {
  test.setTimeout(240_000);
  const world = await makeWorld();
  const email = address('nadia');

  const member = await (await phone(browser)).newPage();
  const coach = await (await browser.newContext()).newPage();

  await test.step('a member is invited by mail and comes in', async () => {
    await world.coach.api.ok<InvitationDto>('POST', '/api/invitations', {
      name: 'Nadia Brandt',
      email,
      role: 'member',
    });
    const mail = await mailTo(world.coach.api, email, /invites you/);
    await member.goto(linkOf(mail));
    await member.getByLabel('Password', { exact: true }).fill(PASSWORD);
    await member.getByLabel('Date of birth').fill('1990-05-17');
    await member.getByRole('button', { name: 'Accept and come in' }).click();
    await member.getByRole('button', { name: 'I have read this' }).click();
    await expect(member).toHaveURL(/\/today/);
  });

  await test.step('films the front and the side of the lift', async () => {
    await member.getByRole('link', { name: /film the front/i }).click();
    await sendClips(member, {
      front: await phoneClip('phone-front.mov'),
      side: await phoneClip('phone-side.mov'),
    });
  });

  let takePath = '';
  await test.step('a coach finds the take in the queue and picks it up', async () => {
    await signIn(coach, world.coach);
    await expect(coach).toHaveURL(/\/queue/);
    const row = coach.getByRole('link', { name: /Nadia Brandt/ });
    await expect(row).toBeVisible({ timeout: 60_000 });
    await row.click();
    await expect(coach.getByRole('heading', { level: 1, name: /Goblet squat/ })).toBeVisible();
    takePath = new URL(coach.url()).pathname;
  });

  await test.step('both views stand on one frame and step together', async () => {
    const videos = coach.locator('mf-board-player video');
    await expect(videos).toHaveCount(2);
    await expect
      .poll(() => videos.evaluateAll((all) => all.every((v) => (v as HTMLVideoElement).readyState >= 2)))
      .toBe(true);
    for (let i = 0; i < 30; i += 1) await coach.keyboard.press('ArrowRight');
    await expect(coach.locator('mf-rail .now')).toHaveText(/frame 30/);
    // 60 frames a second: frame 30 spans 0.5 to 0.517 s, and both pictures stand in its middle.
    await expect
      .poll(() =>
        videos.evaluateAll((all) => all.map((v) => Math.floor((v as HTMLVideoElement).currentTime * 60))),
      )
      .toEqual([30, 30]);
    const sizes = await videos.evaluateAll((all) =>
      all.map((v) => [(v as HTMLVideoElement).videoWidth, (v as HTMLVideoElement).videoHeight]),
    );
    expect(sizes).toEqual([
      [720, 1280],
      [720, 1280],
    ]);
  });

  await test.step('the coach says what is seen, by typing and by number keys', async () => {
    await coach.keyboard.type('Here the heels leave the floor');
    await coach.keyboard.press('Enter');
    await expect(coach.locator('mf-comment-list')).toContainText('Here the heels leave the floor');
    // The second of the checklist: faults stand in the order of a rep.
    await coach.keyboard.press('2');
    await expect(coach.getByRole('button', { name: /Heels lift, bottom: seen/ })).toBeVisible();
    await coach.getByRole('button', { name: 'Mark the rest clear' }).click();
    await expect(coach.getByRole('button', { name: /Knees fall in, up: clear/ })).toBeVisible();
  });

  await test.step('what was written outlives a reload', async () => {
    await coach.getByLabel('The one thing to change').fill('Leave a full print on the floor');
    await expect(coach.getByText('Kept. You can leave and come back.')).toBeVisible();
    await coach.reload();
    await expect(coach.getByLabel('The one thing to change')).toHaveValue('Leave a full print on the floor');
    await expect(coach.locator('mf-comment-list')).toContainText('Here the heels leave the floor');
  });

  await test.step('the answer goes out with a call and a request for another take', async () => {
    await coach.getByText('keep it light').click();
    await coach.getByLabel('Ask for another take').check();
    await coach.getByRole('checkbox', { name: 'front' }).uncheck();
    await coach.getByLabel('What to show').fill('Two slow ones, side only');
    await coach.getByRole('button', { name: 'Send to Nadia' }).click();
    await expect(coach.getByText(/Sent to Nadia/)).toBeVisible();
  });

  await test.step('the member reads it from the mail, at the instant', async () => {
    const mail = await mailTo(world.coach.api, email, /answered your goblet squat/);
    await member.goto(linkOf(mail));
    await expect(member.getByRole('heading', { name: 'Leave a full print on the floor' })).toBeVisible();
    await expect(member.getByText('Here the heels leave the floor')).toBeVisible();
    await expect(member.getByText('Keep it light')).toBeVisible();
  });

  await test.step('films it again, side only, in one tap', async () => {
    await member.getByRole('button', { name: 'Film it again, side only' }).click();
    await expect(member).toHaveURL(/\/filming\//);
    await expect(member.getByLabel('Choose the front clip')).toHaveCount(0);
    await sendClips(member, { side: await phoneClip('plain-side.mp4') });
  });

  await test.step('the board of take 2 shows take 1 and its answer', async () => {
    await coach.goto(`${stageUrl()}/queue`);
    const row = coach.getByRole('link', { name: /Nadia Brandt/ });
    await expect(row).toBeVisible({ timeout: 60_000 });
    await row.click();
    await expect(coach.getByRole('heading', { level: 1, name: /take 2/ })).toBeVisible();
    await expect(coach.locator('mf-board-player')).toHaveCount(2);
    await expect(coach.locator('mf-said-before')).toContainText('Leave a full print on the floor');
    expect(new URL(coach.url()).pathname).not.toBe(takePath);
  });

  await test.step('the first take carries its answer, read by the member', async () => {
    const id = takePath.split('/').at(-1) ?? '';
    const take = await world.owner.api.get<TakeDetailDto>(`/api/takes/${id}`);
    expect(take.answer?.refilm?.views).toEqual(['side']);
    expect(take.readAt).not.toBeNull();
  });
});
