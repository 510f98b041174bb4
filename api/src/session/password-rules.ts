import { badInput } from '@shared/errors';

/** The demo's password, known to everybody who reads the page. */
export const demoPassword = 'first-light';

/**
 * Commonest passwords of ten characters and more, from memory; shorter ones are refused for their length.
 * NIST SP 800-63B asks that new passwords be held against a list of common ones.
 */
const commonest = new Set([
  '0123456789',
  '1234567890',
  '0987654321',
  '1111111111',
  '123456789a',
  '1234567891',
  '12345678910',
  '123123123123',
  '1q2w3e4r5t',
  '1qaz2wsx3edc',
  'a123456789',
  'abc1234567',
  'abcd123456',
  'abcdefghij',
  'administrator',
  'asdfghjkl1',
  'asdfghjkl;',
  'baseball123',
  'basketball',
  'changeme123',
  'chocolate1',
  'football123',
  'iloveyou12',
  'iloveyou123',
  'letmein123',
  'letmeinnow',
  'password01',
  'password10',
  'password11',
  'password12',
  'password123',
  'password1234',
  'passw0rd123',
  'p@ssw0rd123',
  'princess123',
  'q1w2e3r4t5',
  'q1w2e3r4t5y6',
  'qazwsxedcrfv',
  'qwerty1234',
  'qwerty12345',
  'qwerty123456',
  'qwertyuiop',
  'qwertyuiop1',
  'qwertyuiop123',
  'starwars123',
  'sunshine123',
  'superman123',
  'welcome123',
  'welcome1234',
  'zaq12wsxcde3',
]);

/** Refuses a new password that is easily guessed. `path` is the field it stood in. Throws 400. */
export function checkNewPassword(
  password: string,
  context: { email: string; demo: boolean; path: string },
): void {
  const message = complaint(password.toLowerCase(), context);
  if (message) throw badInput([{ path: context.path, message }]);
}

function complaint(password: string, { email, demo }: { email: string; demo: boolean }): string | null {
  const localPart = email.toLowerCase().split('@')[0] ?? '';
  if (localPart.length >= 3 && password.includes(localPart))
    return 'Leave your e-mail address out of your password.';
  if (commonest.has(password) || new Set(password).size < 4)
    return 'That password is one of the first to be guessed. Choose another.';
  if (!demo && password === demoPassword)
    return 'That is the demo password, which everybody knows. Choose another.';
  return null;
}
