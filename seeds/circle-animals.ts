/**
 * Bands set by the invented circle (no published transport bands exist; a real circle asks its veterinarian). The own
 * outdoor limits only tighten the circle's guard rails.
 */
export const species = [
  {
    commonName: 'corn snake',
    scientificName: 'Pantherophis guttatus',
    band: [60, 86],
    endurance: [48, 92],
    outdoor: [null, null],
    massG: 160,
  },
  {
    commonName: 'ball python',
    scientificName: 'Python regius',
    band: [62, 90],
    endurance: [52, 95],
    outdoor: [40, null],
    massG: 450,
  },
  {
    commonName: 'crested gecko',
    scientificName: 'Correlophus ciliatus',
    band: [58, 82],
    endurance: [48, 86],
    outdoor: [null, 84],
    massG: 35,
  },
  {
    commonName: 'leopard gecko',
    scientificName: 'Eublepharis macularius',
    band: [60, 92],
    endurance: [50, 97],
    outdoor: [null, null],
    massG: 55,
  },
  {
    commonName: 'bearded dragon',
    scientificName: 'Pogona vitticeps',
    band: [60, 92],
    endurance: [50, 98],
    outdoor: [null, null],
    massG: 250,
  },
  {
    commonName: 'boa',
    scientificName: 'Boa constrictor',
    band: [62, 90],
    endurance: [52, 95],
    outdoor: [40, null],
    massG: 900,
  },
  {
    commonName: 'kingsnake',
    scientificName: 'Lampropeltis getula',
    band: [58, 89],
    endurance: [48, 94],
    outdoor: [null, null],
    massG: 220,
  },
  {
    commonName: 'blue-tongued skink',
    scientificName: 'Tiliqua scincoides',
    band: [60, 90],
    endurance: [50, 95],
    outdoor: [null, null],
    massG: 380,
  },
] as const;

export const boxes = [
  { name: 'Small box', lengthIn: 12, widthIn: 9, heightIn: 6, foamIn: 0.75 },
  { name: 'Medium box', lengthIn: 12, widthIn: 12, heightIn: 10, foamIn: 0.75 },
  { name: 'Large box', lengthIn: 16, widthIn: 12, heightIn: 12, foamIn: 1 },
] as const;
