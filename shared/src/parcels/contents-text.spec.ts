import { contentsText } from './contents-text';

describe('contentsText', () => {
  it.each([
    [[{ quantity: 1, commonName: 'corn snake' }], '1 corn snake'],
    [[{ quantity: 2, commonName: 'ball python' }], '2 ball pythons'],
    [
      [
        { quantity: 3, commonName: 'gopher' },
        { quantity: 1, commonName: 'boa' },
      ],
      '3 gophers, 1 boa',
    ],
    [
      [
        { quantity: 1, commonName: 'boa' },
        { quantity: 1, commonName: 'boa' },
      ],
      '2 boas',
    ],
    [
      [
        { quantity: 2, commonName: 'Mojave finch' },
        { quantity: 2, commonName: 'ringed ivy' },
      ],
      '2 Mojave finches, 2 ringed ivies',
    ],
    [[], ''],
  ])('says %j as "%s"', (contents, text) => {
    expect(contentsText(contents)).toBe(text);
  });
});
