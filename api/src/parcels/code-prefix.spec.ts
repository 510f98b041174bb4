import { codePrefix } from './code-prefix';

describe('codePrefix', () => {
  it.each([
    ['Hill Country circle', 'HC'],
    ['Great Lakes & Upper River Circle', 'GLU'],
    ['Circle', 'P'],
    ['', 'P'],
  ])('makes of "%s" %s', (name, prefix) => {
    expect(codePrefix(name)).toBe(prefix);
  });
});
