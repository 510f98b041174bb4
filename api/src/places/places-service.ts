import {
  boxNew,
  counterNew,
  speciesNew,
  type Box,
  type BoxNew,
  type Carrier,
  type Counter,
  type CounterNew,
  type Hub,
  type PostalCodeInfo,
  type Species,
  type SpeciesNew,
} from '@shared/contract';
import { notFound } from '@shared/errors';
import type { Deps } from '../deps';
import { createCatalog, type Catalog, type CatalogKind } from './catalog';
import { checkCounter } from './counter-rules';
import * as queries from './places-queries';
import { findPostalCode, nearestHoldCounters } from './postal-codes';

export interface PlacesService {
  counters(): Promise<Counter[]>;
  /** Throws 404. */
  counter(id: number): Promise<Counter>;
  species(): Promise<Species[]>;
  boxes(): Promise<Box[]>;
  /** Throws 404. */
  box(id: number): Promise<Box>;
  carriers(): Promise<Carrier[]>;
  hubs(): Promise<Hub[]>;
  /** The sort hub that a carrier's parcels pass. Throws 404. */
  hubOfCarrier(carrierId: number): Promise<Hub>;
  /** Offline ZIP table; null when the ZIP is not in it. */
  postalCode(postalCode: string): Promise<PostalCodeInfo | null>;
  /** Reading one, adding and changing, for the admin's pages. */
  readonly catalogs: {
    readonly counters: Catalog<CounterNew, Counter>;
    readonly species: Catalog<SpeciesNew, Species>;
    readonly boxes: Catalog<BoxNew, Box>;
  };
}

const counterKind: CatalogKind<CounterNew, Counter> = {
  table: 'counters',
  subjectKind: 'counter',
  what: 'The counter',
  order: ['state', 'city', 'name', 'id'],
  schema: counterNew,
  toRow: queries.counterToRow,
  fromRow: queries.counterFromRow,
  nameOf: (counter) => counter.name,
  check: checkCounter,
};

const speciesKind: CatalogKind<SpeciesNew, Species> = {
  table: 'species',
  subjectKind: 'species',
  what: 'The species',
  order: ['common_name', 'id'],
  schema: speciesNew,
  toRow: queries.speciesToRow,
  fromRow: queries.speciesFromRow,
  nameOf: (species) => species.commonName,
};

const boxKind: CatalogKind<BoxNew, Box> = {
  table: 'boxes',
  subjectKind: 'box',
  what: 'The box',
  order: ['id'],
  schema: boxNew,
  toRow: queries.boxToRow,
  fromRow: queries.boxFromRow,
  nameOf: (box) => box.name,
};

/** Counters, sort hubs, carriers, species, box sizes and ZIP codes. */
export function createPlacesService(deps: Deps): PlacesService {
  const catalogs = {
    counters: createCatalog(deps, counterKind),
    species: createCatalog(deps, speciesKind),
    boxes: createCatalog(deps, boxKind),
  };
  return {
    catalogs,
    counters: () => catalogs.counters.list(),
    counter: (id) => catalogs.counters.get(id),
    species: () => catalogs.species.list(),
    boxes: () => catalogs.boxes.list(),
    box: (id) => catalogs.boxes.get(id),
    carriers: () => queries.listCarriers(deps.db),
    hubs: () => queries.listHubs(deps.db),
    async hubOfCarrier(carrierId) {
      const carrier = (await queries.listCarriers(deps.db)).find((one) => one.id === carrierId);
      const hub = carrier && (await queries.listHubs(deps.db)).find((one) => one.id === carrier.hubId);
      if (!hub) throw notFound('The sort hub');
      return hub;
    },
    async postalCode(postalCode) {
      const found = await findPostalCode(postalCode);
      return found && { ...found, nearest: nearestHoldCounters(found, await catalogs.counters.list()) };
    },
  };
}
