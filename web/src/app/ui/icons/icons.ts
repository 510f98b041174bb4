/** Our own icons, drawn on a 24 grid with a 1.8 round stroke; used as `<mat-icon svgIcon="parcel" />`. */
const strokes = {
  menu: 'M4 7h16M4 12h16M4 17h10',
  close: 'M6 6l12 12M18 6L6 18',
  parcel: 'M4 8.5l8-4 8 4v7.5l-8 4-8-4zM4 8.5l8 4 8-4M12 12.5V20M8 6.5l8 4',
  route:
    'M6 20a2 2 0 1 0 0-4 2 2 0 0 0 0 4zM18 8a2 2 0 1 0 0-4 2 2 0 0 0 0 4zM8 18h6a3.5 3.5 0 0 0 0-7h-4a2.5 2.5 0 0 1 0-5h6',
  van: 'M3 16V7.5h10.5V16M13.5 10h3.8l3.2 3.4V16M3 16h2m4 0h6m4 0h1.5M7 18a2 2 0 1 0 0-4 2 2 0 0 0 0 4zM17 18a2 2 0 1 0 0-4 2 2 0 0 0 0 4z',
  calendar: 'M4.5 6.5h15v13h-15zM4.5 10.5h15M8.5 4v4M15.5 4v4',
  desk: 'M4 12h5l1.5 3h3L15 12h5M4 12l3-7h10l3 7v7H4z',
  counter: 'M4 10l1.5-5h13L20 10M4 10v9h16v-9M4 10h16M9 19v-5h6v5',
  species:
    'M18.5 5.5c-4 0-3 5-6.5 5s-3.5-3-6.5-1.500c-2.5 1.5-1 5.5 2 5.500h7c3 0 3.5 4.5-.5 4.500H8M18.5 5.500h1.5',
  box: 'M4 8h16v11H4zM4 8l2-3h12l2 3M12 5v14',
  people:
    'M9 11a3 3 0 1 0 0-6 3 3 0 0 0 0 6zM3.5 19c0-3.5 2.5-5.5 5.5-5.500s5.5 2 5.5 5.500M15.5 5.500a3 3 0 0 1 0 5.500M17.5 14c2 .8 3 2.5 3 5',
  person: 'M12 11.500a3.5 3.5 0 1 0 0-7 3.5 3.5 0 0 0 0 7zM5 20c0-4 3-6 7-6s7 2 7 6',
  'sign-out': 'M14 5H6v14h8M10.5 12H20M16.5 8.500L20 12l-3.5 3.5',
  sun: 'M12 16a4 4 0 1 0 0-8 4 4 0 0 0 0 8zM12 3v2M12 19v2M3 12h2M19 12h2M5.6 5.600l1.5 1.500M16.9 16.900l1.5 1.500M18.4 5.600l-1.5 1.500M7.1 16.900l-1.5 1.5',
  moon: 'M19.5 14.500A8 8 0 0 1 9.5 4.500a8 8 0 1 0 10 10z',
  half: 'M12 20a8 8 0 1 0 0-16 8 8 0 0 0 0 16zM12 4v16M15 5v14M17.8 7v10',
  plus: 'M12 5v14M5 12h14',
  minus: 'M5 12h14',
  search: 'M10.5 17a6.5 6.5 0 1 0 0-13 6.5 6.5 0 0 0 0 13zM15.5 15.500L20 20',
  copy: 'M9 9h10.500v11H9zM15 9V4.500H4.500V15H9',
  check: 'M5 12.500l4.5 4.500L19 7',
  'chevron-left': 'M14.5 6l-6 6 6 6',
  'chevron-right': 'M9.5 6l6 6-6 6',
  'chevron-down': 'M6 9.500l6 6 6-6',
  'chevron-up': 'M6 14.500l6-6 6 6',
  'arrow-right': 'M4.5 12h15M14 6.500l5.5 5.5-5.5 5.5',
  edit: 'M5 19l1-4L16 5l3 3L9 18zM14 7l3 3',
  trash: 'M5 7h14M9.5 7V4.500h5V7M7 7l1 12.500h8L17 7',
  mail: 'M4 6h16v12.500H4zM4 7.500l8 6 8-6',
  pin: 'M12 14v6M8 4.500h8l-1 5 2.5 4.500h-11L9 9.500z',
  clock: 'M12 20a8 8 0 1 0 0-16 8 8 0 0 0 0 16zM12 7.500V12l3 2',
  warn: 'M12 4.500L21 19.500H3zM12 10v4.500M12 16.800v.4',
  info: 'M12 20a8 8 0 1 0 0-16 8 8 0 0 0 0 16zM12 11v5M12 8v.4',
  table: 'M4 5.500h16v13H4zM4 10h16M4 14.300h16M10 5.500v13',
  bars: 'M6 20V9M12 20V5M18 20v-8',
  phone: 'M7 3.500h10v17H7zM11 17.500h2',
  call: 'M6 4h3.500l1.5 4.5-2 1.500c1 2 3 4 5 5l1.5-2 4.5 1.500V18c0 1.5-1 2-2 2C10.5 19.5 4.5 13.5 4 6c0-1 .5-2 2-2z',
  thermometer: 'M10 14V6a2 2 0 1 1 4 0v8a4 4 0 1 1-4 0zM12 9v7',
  refresh: 'M19 12a7 7 0 1 1-2-5M17.5 3.500V7H14',
  link: 'M10 14l4-4M9 10.500l-2.5 2.500a3.3 3.3 0 0 0 4.7 4.700L13.5 15M15 13.500l2.5-2.500a3.3 3.3 0 0 0-4.7-4.700L10.5 9',
  more: 'M12 6v.01M12 12v.01M12 18v.01',
  up: 'M12 19V6M6.5 11.500L12 6l5.5 5.5',
  down: 'M12 5v13M6.5 12.500L12 18l5.5-5.5',
  map: 'M4 6.500l5.5-2 5 2 5.5-2v13l-5.5 2-5-2-5.5 2zM9.5 4.500v13M14.5 6.500v13',
  money:
    'M12 20a8 8 0 1 0 0-16 8 8 0 0 0 0 16zM14.5 9.500c-.5-1-1.5-1.3-2.5-1.3-1.5 0-2.5.7-2.5 1.8 0 2.7 5.2 1.3 5.2 4 0 1.2-1.2 1.9-2.7 1.9-1.2 0-2.2-.4-2.7-1.500M12 6.800v10.4',
  undo: 'M9 7L4.5 11.5 9 16M4.5 11.500H15a4.5 4.5 0 0 1 0 9h-2',
  bell: 'M6.5 16.500V11a5.5 5.5 0 0 1 11 0v5.500l1.5 1.500H5zM10.5 20.500h3',
  globe:
    'M12 20a8 8 0 1 0 0-16 8 8 0 0 0 0 16zM4 12h16M12 4c2.700 2.200 4 4.900 4 8s-1.300 5.800-4 8M12 4c-2.700 2.200-4 4.900-4 8s1.300 5.800 4 8',
  filter: 'M4 6h16l-6.5 7.500V19l-3-1.500v-4z',
} as const;

export type IconName = keyof typeof strokes;

/** Every icon's SVG text by name. */
export const iconLiterals: readonly (readonly [IconName, string])[] = (
  Object.keys(strokes) as IconName[]
).map((name) => [
  name,
  `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 24 24" fill="none" stroke="currentColor" stroke-width="${name === 'more' ? 2.8 : 1.8}" stroke-linecap="round" stroke-linejoin="round"><path d="${strokes[name]}"/></svg>`,
]);
