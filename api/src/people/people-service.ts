import type { Availability, Person } from '@shared/contract';
import type { Deps } from '../deps';

export interface PeopleService {
  /** Throws 404. */
  get(id: number): Promise<Person>;
  list(): Promise<Person[]>;
  /** Active people who hold the role, with their profiles. */
  withRole(role: 'breeder' | 'coordinator'): Promise<Person[]>;
  availability(personId: number): Promise<Availability>;
  /** Whether a coordinator is free to drive on a date: the weekly pattern, single days, days away. */
  canDrive(person: Person, availability: Availability, date: string): boolean;
  /** The id of the person with this e-mail, made a buyer; created without a password when new. Never changes a name. */
  ensureBuyer(buyer: { name: string; email: string; phone: string | null; zone: string }): Promise<number>;
}

export function createPeopleService(deps: Deps): PeopleService {
  throw new Error(`not built yet ${deps.config.PORT}`);
}
