import { describe, expect, it } from 'vitest';
import { keyWords, mayAct, nameOfKey, placeOf, type KeyContext, type PressedKey } from './key-rules';

const press = (key: string, more: Partial<PressedKey> = {}): PressedKey => ({
  key,
  ctrlKey: false,
  metaKey: false,
  altKey: false,
  shiftKey: false,
  isComposing: false,
  defaultPrevented: false,
  ...more,
});
const open: KeyContext = { place: 'elsewhere', isCovered: false, hasSingleKeys: true };

describe('the rules of keys', () => {
  it('names a key by what it makes, so that a sign needs no Shift', () => {
    expect(nameOfKey(press('C', { shiftKey: true }))).toBe('c');
    expect(nameOfKey(press('?', { shiftKey: true }))).toBe('?');
    expect(nameOfKey(press('ArrowLeft', { shiftKey: true }))).toBe('Shift+ArrowLeft');
    expect(nameOfKey(press(' '))).toBe('Space');
    expect(nameOfKey(press('Enter', { metaKey: true }))).toBe('Mod+Enter');
  });

  it('leaves typing alone', () => {
    expect(mayAct(press('c'), { ...open, place: 'text' })).toBe(false);
    expect(mayAct(press('c', { isComposing: true }), open)).toBe(false);
    expect(mayAct(press('c'), open)).toBe(true);
  });

  it('lets Escape and Ctrl keys act from a text field', () => {
    expect(mayAct(press('Escape'), { ...open, place: 'text' })).toBe(true);
    expect(mayAct(press('Enter', { ctrlKey: true }), { ...open, place: 'text' })).toBe(true);
  });

  it('leaves a focused button its own two keys', () => {
    expect(mayAct(press(' '), { ...open, place: 'button' })).toBe(false);
    expect(mayAct(press('Enter'), { ...open, place: 'button' })).toBe(false);
    expect(mayAct(press('3'), { ...open, place: 'button' })).toBe(true);
  });

  it('rests while something is open over the page, and when a part of the page has taken the key', () => {
    expect(mayAct(press('c'), { ...open, isCovered: true })).toBe(false);
    expect(mayAct(press('ArrowLeft', { defaultPrevented: true }), open)).toBe(false);
  });

  it('can be switched off, Ctrl keys and Escape aside', () => {
    const off = { ...open, hasSingleKeys: false };
    expect(mayAct(press('c'), off)).toBe(false);
    expect(mayAct(press('?'), off)).toBe(false);
    expect(mayAct(press('Enter', { ctrlKey: true }), off)).toBe(true);
  });

  it('tells places that take typing from those that do not', () => {
    const radio = document.createElement('input');
    radio.type = 'radio';
    expect(placeOf(document.createElement('textarea'))).toBe('text');
    expect(placeOf(document.createElement('select'))).toBe('text');
    expect(placeOf(radio)).toBe('button');
    expect(placeOf(document.createElement('button'))).toBe('button');
    expect(placeOf(document.body)).toBe('elsewhere');
  });

  it('writes keys as their caps read', () => {
    expect(keyWords('Mod+Enter')).toBe('Ctrl Enter');
    expect(keyWords('Shift+ArrowLeft')).toBe('Shift ←');
    expect(keyWords('c')).toBe('C');
    expect(keyWords('+')).toBe('+');
  });
});
