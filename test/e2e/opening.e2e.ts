import { expect, test } from '@playwright/test';
import { caller, stageUrl } from './support/stage-access';
import { PASSWORD, address, linkOf, mailTo } from './support/world';

test('an owner opens a gym and invites; a coach adds a lift and assigns it; a member is asked to film it', async ({
  browser,
}) => {
  const emails = { owner: address('owner'), coach: address('coach'), member: address('member') };
  const owner = await (await browser.newContext()).newPage();
  const coach = await (await browser.newContext()).newPage();
  const member = await (await browser.newContext()).newPage();

  await test.step('the owner opens the gym', async () => {
    await owner.goto(`${stageUrl()}/open-a-gym`);
    await owner.getByLabel('Name of the gym').fill('Granite Cove Barbell');
    await owner.getByLabel('Time zone').selectOption('Europe/Stockholm');
    await owner.getByLabel('Your name').fill('Runa Eklund');
    await owner.getByLabel('E-mail').fill(emails.owner);
    await owner.getByLabel('Password', { exact: true }).fill('passwordpassword');
    await owner.getByRole('button', { name: 'Open the gym' }).click();
    await expect(owner.locator('p.error', { hasText: 'Use a few words of your own' })).toBeVisible();
    await owner.getByLabel('Password', { exact: true }).fill(PASSWORD);
    await owner.getByRole('button', { name: 'Open the gym' }).click();
    await expect(owner).toHaveURL(/\/(queue|turnaround|people)/);
  });

  await test.step('and invites a coach and a member', async () => {
    for (const [name, role] of [
      ['Odd Falk', 'coach'],
      ['Liv Sund', 'member'],
    ] as const) {
      await owner.goto(`${stageUrl()}/people/invite`);
      const sheet = owner.locator('mf-side-sheet');
      await sheet.getByLabel('Name').fill(name);
      await sheet.getByLabel('E-mail address').fill(emails[role]);
      await sheet.getByLabel('Role').selectOption(role);
      await owner.getByRole('button', { name: `Invite a ${role}` }).click();
      await expect(owner.getByText(emails[role], { exact: true })).toBeVisible();
    }
  });

  await test.step('both come in by their mails', async () => {
    await coach.goto(linkOf(await mailTo(caller(), emails.coach, /invites you/)));
    await coach.getByLabel('Password', { exact: true }).fill(PASSWORD);
    await coach.getByRole('button', { name: 'Accept and come in' }).click();
    await expect(coach).toHaveURL(/\/queue/);
    await member.goto(linkOf(await mailTo(caller(), emails.member, /invites you/)));
    await member.getByLabel('Password', { exact: true }).fill(PASSWORD);
    await member.getByLabel('Date of birth').fill('1988-02-03');
    await member.getByRole('button', { name: 'Accept and come in' }).click();
    await member.getByRole('button', { name: 'I have read this' }).click();
    await expect(member).toHaveURL(/\/today/);
  });

  await test.step('the coach adds a lift with a fault', async () => {
    await coach.goto(`${stageUrl()}/lifts/new`);
    await coach.getByLabel('Name').first().fill('Goblet squat');
    await coach.getByLabel('Pattern').selectOption('squat');
    await coach.getByRole('button', { name: 'Add a fault' }).click();
    const fault = coach.locator('mf-part-row').first();
    await fault.getByLabel('Name').fill('Heels leave the floor');
    await fault.getByLabel('Phase').selectOption('bottom');
    await fault.getByLabel('Cue').fill('Leave two full footprints');
    await coach.getByRole('button', { name: 'Add the lift' }).click();
    await expect(coach.getByRole('heading', { name: 'Goblet squat' })).toBeVisible();
    await expect(coach.getByText('Leave two full footprints')).toBeVisible();
  });

  await test.step('and assigns it to everyone', async () => {
    await coach.goto(`${stageUrl()}/assignments/new`);
    const sheet = coach.locator('mf-side-sheet');
    await sheet.getByLabel('Lift').selectOption({ label: 'Goblet squat' });
    await sheet.getByLabel('Title').fill('Two quiet squats, please');
    await sheet.getByLabel('Reps').fill('8');
    await sheet.getByLabel('Rounds').fill('4');
    await coach.getByRole('button', { name: 'Ask to film' }).click();
    await expect(coach.getByText('Two quiet squats, please').first()).toBeVisible();
  });

  await test.step('the member sees it at once, without a reload', async () => {
    await expect(member.getByRole('heading', { name: 'Film your goblet squat.' })).toBeVisible();
    await expect(member.getByRole('link', { name: 'Two quiet squats, please' })).toBeVisible();
  });
});
