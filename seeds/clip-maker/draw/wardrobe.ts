import type { Look, Outfit, SkinTone } from '../options';
import { type Material, material, tinted } from './mesh';

const SKIN: Record<SkinTone, string> = {
  porcelain: '#e9bfa4',
  sand: '#d9a682',
  amber: '#c48a60',
  chestnut: '#a06a45',
  umber: '#7b4d33',
  ebony: '#573727',
};

/** Shirt, legs, shoe and sole of each outfit. */
const CLOTHES: Record<Outfit, [string, string, string, string]> = {
  spruce: ['#1f7a63', '#2b3034', '#e6e2d8', '#f4f2ec'],
  slate: ['#8fa3ad', '#2d3a4a', '#3b4148', '#e9e6de'],
  brick: ['#b0523c', '#34373b', '#d9d4c8', '#f2efe8'],
  navy: ['#2f5c8a', '#4b4f52', '#c9542e', '#f2efe8'],
  ochre: ['#cf9a3c', '#2f3d3a', '#53595c', '#efece4'],
  plum: ['#7d4a6b', '#26292d', '#dcd8ce', '#f4f2ec'],
};

export interface Wardrobe {
  skin: Material;
  lip: Material;
  hair: Material;
  stubble: Material;
  shirt: Material;
  shirtDark: Material;
  legs: Material;
  legsDark: Material;
  stripe: Material;
  shoe: Material;
  sole: Material;
  sock: Material;
}

/** The materials of a look. */
export function wardrobeOf(look: Look): Wardrobe {
  const [shirt, legs, shoe, sole] = CLOTHES[look.outfit];
  const skin = material(SKIN[look.skin], 0.1, 1);
  const hair = material(look.hairColour, 0.16);
  const mixRgb = (a: Material, b: Material, s: number): Material => ({
    ...a,
    rgb: [0, 1, 2].map((c) => (a.rgb[c] ?? 0) * (1 - s) + (b.rgb[c] ?? 0) * s) as unknown as Material['rgb'],
  });
  return {
    skin,
    lip: mixRgb(tinted(skin, 0.62), material('#a03c3c'), 0.3),
    hair,
    stubble: mixRgb(skin, hair, 0.55),
    shirt: material(shirt, 0.02),
    shirtDark: tinted(material(shirt), 0.72),
    legs: material(legs, look.legwear === 'leggings' ? 0.12 : 0.03),
    legsDark: tinted(material(legs), 0.6),
    stripe:
      look.legwear === 'leggings' ? material(legs, 0.12) : mixRgb(material(legs), material('#f4f2ec'), 0.22),
    shoe: material(shoe, 0.06),
    sole: material(sole, 0.05),
    sock: material('#d8d5cd'),
  };
}
