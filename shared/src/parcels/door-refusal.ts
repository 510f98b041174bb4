/** Why a box must not be left at a door, or null: a venomous animal is only handed out at a counter. Our rule, no source. */
export function doorRefusal(
  service: 'hold' | 'door',
  species: readonly { readonly commonName: string; readonly venomous: boolean }[],
): string | null {
  const venomous = species.find((one) => one.venomous);
  return venomous && service === 'door'
    ? `The ${venomous.commonName} is venomous: it is only handed out at a counter, never left at a door.`
    : null;
}
