import type { Person, Role } from '@shared/contract';

/** Whether a person can come in, and how. */
export type PersonState = 'active' | 'invited' | 'by-link' | 'off';

/** A buyer without a password was never invited: the arrival's own link is enough. */
export function personState(person: Pick<Person, 'active' | 'hasPassword' | 'roles'>): PersonState {
  if (!person.active) return 'off';
  if (person.hasPassword) return 'active';
  return person.roles.every((role) => role === 'buyer') ? 'by-link' : 'invited';
}

/** How each state reads, with its glyph; the word alone must do. */
export const stateWords: Readonly<Record<PersonState, { word: string; icon: string; about: string }>> = {
  active: { word: 'active', icon: 'check', about: 'Signs in with a password.' },
  invited: { word: 'invited', icon: 'mail', about: 'Has not chosen a password yet.' },
  'by-link': { word: 'by link', icon: 'link', about: 'Comes by the link in the mail about an arrival.' },
  off: { word: 'switched off', icon: 'close', about: 'Cannot sign in.' },
};

/** What one looks for in the list of people; empty texts look for all. */
export interface PeopleSearch {
  readonly text: string;
  readonly role: Role | '';
  readonly state: PersonState | '';
}

/** The people that a search finds: by name, business, e-mail or city, role and state. */
export function foundPeople(people: readonly Person[], search: PeopleSearch): Person[] {
  const words = search.text.trim().toLowerCase();
  return people.filter((person) => {
    const text = [person.name, person.businessName, person.email, person.city].join(' ').toLowerCase();
    return (
      text.includes(words) &&
      (search.role === '' || person.roles.includes(search.role)) &&
      (search.state === '' || personState(person) === search.state)
    );
  });
}
