import { randomInt } from 'node:crypto';
import type { Role } from '../../server/contract';

export interface DemoPerson {
  readonly key: string;
  readonly name: string;
  readonly role: Role;
  readonly email: string;
  readonly kit: string | null;
}

const person = (key: string, name: string, role: Role, kit: string | null = null): DemoPerson => ({
  key,
  name,
  role,
  kit,
  email: `${key}@slipway.example`,
});

export const GYM_NAME = 'Slipway Strength';
export const TIME_ZONE = 'Europe/Stockholm';

/** The people of the demo, all invented. */
export const PEOPLE = [
  person('wilma', 'Wilma Achterberg', 'owner'),
  person('maren', 'Maren Oduya', 'coach'),
  person('petru', 'Petru Salas', 'coach'),
  person('tove', 'Tove Lindqvist', 'member', 'One 16 kg and one 24 kg bell, two chairs, a garage wall'),
  person('ilmari', 'Ilmari Saarela', 'member', 'One 24 kg bell on deck, whenever the sea is calm'),
  person('signe', 'Signe Brandvold', 'member', 'An 8 kg bell and a pair of bands; my physiotherapist knows'),
  person('joaquin', 'Joaquin Ferrer', 'member', 'An adjustable dumbbell up to 24 kg, after night shifts'),
  person('edda', 'Edda Thorne', 'member', 'A barbell and 90 kg of plates in the boat shed'),
  person('bertil', 'Bertil Hallin', 'member', 'A 12 kg bell, still in its box'),
] as const satisfies readonly DemoPerson[];

const WORDS =
  'anchor basalt birch bramble canvas copper coral drift ember fathom fjord flint gannet granite harbour heather juniper kelp lantern larch lichen maple marble meadow mussel oyster pebble pewter plank quarry raven reed rigging saffron schooner skerry slate sorrel spruce tallow tiller timber velvet walnut whistle willow'.split(
    ' ',
  );

/** Four words by chance; long enough for the product's own rule, and made anew in each instance. */
export function madePassword(): string {
  const word = () => WORDS[randomInt(WORDS.length)] ?? 'harbour';
  return `${word()} ${word()} ${word()} ${word()}`;
}
