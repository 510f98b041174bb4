import argon2 from 'argon2';

/** OWASP Password Storage Cheat Sheet: argon2id with 19 MiB, 2 passes, 1 lane at least. */
export const hashOptions = { type: argon2.argon2id, memoryCost: 19456, timeCost: 2, parallelism: 1 } as const;

export const hashPassword = (password: string): Promise<string> => argon2.hash(password, hashOptions);

let nobodys: Promise<string> | null = null;

/** Without a hash one is verified that no password opens, so that an unknown address takes the same time. */
export async function verifyPassword(hash: string | null, password: string): Promise<boolean> {
  nobodys ??= hashPassword('nobody has this password');
  const right = await argon2.verify(hash ?? (await nobodys), password);
  return right && hash !== null;
}
