import type { Environment } from './environment';

export async function seed(env: Environment): Promise<boolean> {
  void env;
  return Promise.resolve(false);
}
