import { describe, expect, it } from 'vitest';
import { GymChange, type GymDto } from '@contract';
import { changeOf, gymForm, retentionWords } from './gym-form';
import { draftOf } from './hours';

const GYM: GymDto = {
  id: 'g',
  name: 'Slipway Strength',
  timeZone: 'Europe/Stockholm',
  promiseHours: 8,
  coachingHours: {
    mon: [{ from: '06:00', to: '20:00' }],
    tue: [],
    wed: [],
    thu: [],
    fri: [],
    sat: [],
    sun: [],
  },
  retentionDays: 365,
  coachesSeeOriginals: false,
};

describe('the form of the gym', () => {
  const week = draftOf(GYM.coachingHours);

  it('sends what the contract takes', () => {
    const form = gymForm(GYM);
    form.controls.name.setValue('  Slipway ');
    const change = changeOf(form, week);
    expect(change?.name).toBe('Slipway');
    expect(GymChange.safeParse(change).success).toBe(true);
  });

  it.each([
    ['promiseHours', 0.4],
    ['promiseHours', 201],
    ['promiseHours', null],
    ['retentionDays', 29],
    ['retentionDays', 30.5],
    ['retentionDays', 3651],
  ] as const)('refuses %s of %o', (name, value) => {
    const form = gymForm(GYM);
    form.controls[name].setValue(value);
    expect(changeOf(form, week)).toBeNull();
  });

  it('refuses a gym without a name, and hours that are wrong', () => {
    const form = gymForm(GYM);
    expect(changeOf(form, { ...week, mon: [{ from: '9', to: '8' }] })).toBeNull();
    form.controls.name.setValue('  ');
    expect(changeOf(form, week)).toBeNull();
  });

  it('says days as people do', () => {
    expect(retentionWords(90)).toBe('90 days');
    expect(retentionWords(365)).toBe('one year');
    expect(retentionWords(730)).toBe('2 years');
    expect(retentionWords(500)).toBe('about 1.4 years');
    expect(retentionWords(null)).toBe('');
  });
});
