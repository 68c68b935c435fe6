import { newPassword } from '@trammel/shared/accounts';
import { describe, expect, it } from 'vitest';
import { weaknessOf } from './password-blocklist.ts';

const own = ['Ada Fell', 'ada.fell@brightwater.example', 'Brightwater Springs'];

describe('a password that would be guessed early', () => {
  it.each([
    'aaaaaaaaaaaaaaa',
    'abababababababab',
    'abcabcabcabcabcabc',
    '123456789012345',
    '987654321098765',
    'qwertyuiopqwertyuiop',
    'abcdefghijklmnopqrs',
    'passwordpassword1',
    'Password1234567!',
    'P4ssw0rd P4ssw0rd',
    'Welcome123Welcome123',
    'trammel trammel trammel',
    'Brightwater2026!!',
    'ada fell brightwater',
    'correct horse battery staple',
    'administrator2026',
  ])('is refused with a reason: %s', (password) => {
    expect(weaknessOf(password, own)).toMatch(/^It .*\.$/);
  });

  it.each([
    'seven brass scribers in a drawer',
    'my password is a song about rivers',
    'kfT9#mQ2vLp8xZr4',
    'мой дядя самых честных правил',
    '定盤の上に三つの真鍮の定規を置いた夜明け',
    'Brightwater has forty lathes and a cat',
  ])('does not touch: %s', (password) => expect(weaknessOf(password, own)).toBeNull());
});

describe('the length of a password', () => {
  const takes = (text: string) => newPassword.safeParse(text).success;
  it('is counted in signs as a person counts them, from 15 to 256', () => {
    expect(takes('x'.repeat(14))).toBe(false);
    expect(takes('x'.repeat(15))).toBe(true);
    expect(takes('🔩'.repeat(14))).toBe(false);
    expect(takes('🔩'.repeat(15))).toBe(true);
    expect(takes('x'.repeat(256))).toBe(true);
    expect(takes('x'.repeat(257))).toBe(false);
    expect(takes(' '.repeat(5) + 'with blanks ' + ' '.repeat(5))).toBe(true);
  });

  it('is the same however the letters were composed', () => {
    expect(newPassword.parse('Prüfmaß für Öle'.normalize('NFD'))).toBe('Prüfmaß für Öle'.normalize('NFC'));
  });
});
