/** What the importer needs to know of a conductor type of the catalogue. */
export interface CatalogueConductor {
  readonly id: string;
  readonly name: string;
  readonly standard: string;
  readonly massKgPerM: number;
  readonly ratedStrengthN: number;
}

type ConductorChoice =
  | { readonly outcome: 'found'; readonly conductor: CatalogueConductor }
  | { readonly outcome: 'unknown'; readonly message: string };

export interface ConductorLookup {
  choose(name: string, standard: string | undefined): ConductorChoice;
}

const suggestionCount = 4;
const keyOf = (name: string) =>
  name
    .toLowerCase()
    .replace(/[\s_./-]+/g, ' ')
    .trim();

/** Fewest single-letter edits between two words. */
export function editDistance(first: string, second: string): number {
  let previous = Array.from({ length: second.length + 1 }, (_, index) => index);
  for (let row = 1; row <= first.length; row += 1) {
    const current = [row];
    for (let column = 1; column <= second.length; column += 1) {
      const swap = (previous[column - 1] ?? 0) + (first[row - 1] === second[column - 1] ? 0 : 1);
      current.push(Math.min(swap, (previous[column] ?? 0) + 1, (current[column - 1] ?? 0) + 1));
    }
    previous = current;
  }
  return previous[second.length] ?? 0;
}

function nearNames(wanted: string, names: readonly string[]): string[] {
  const key = keyOf(wanted);
  const ranked = names.map((name) => {
    const other = keyOf(name);
    const isPart = key.length > 2 && (other.includes(key) || key.includes(other));
    return { name, distance: isPart ? 1 : editDistance(key, other) };
  });
  const allowed = Math.max(2, Math.floor(key.length / 3));
  return ranked
    .filter(({ distance }) => distance <= allowed)
    .sort((one, other) => one.distance - other.distance || one.name.localeCompare(other.name))
    .slice(0, suggestionCount)
    .map(({ name }) => name);
}

function unknownMessage(wanted: string, names: readonly string[]): string {
  const near = nearNames(wanted, names);
  const hint = near.length === 0 ? 'The catalogue lists what is allowed.' : `Near names: ${near.join(', ')}.`;
  return `There is no conductor type "${wanted}" in the catalogue. ${hint}`;
}

/** Finds conductor types by name, and by standard where a name stands under several; capitals and dashes do not count. */
export function createConductorLookup(conductors: readonly CatalogueConductor[]): ConductorLookup {
  const byKey = new Map<string, CatalogueConductor[]>();
  for (const conductor of conductors) {
    const key = keyOf(conductor.name);
    byKey.set(key, [...(byKey.get(key) ?? []), conductor]);
  }
  const names = [...new Set(conductors.map(({ name }) => name))];
  return {
    choose(name, standard) {
      const named = byKey.get(keyOf(name)) ?? [];
      if (named.length === 0) return { outcome: 'unknown', message: unknownMessage(name, names) };
      const fitting = standard === undefined ? named : named.filter((one) => keyOf(one.standard) === keyOf(standard));
      const [conductor, ...others] = fitting;
      const standards = named.map((one) => `"${one.standard}"`).join(', ');
      if (conductor === undefined) {
        return {
          outcome: 'unknown',
          message: `"${name}" is not in the catalogue under "${standard ?? ''}"; allowed: ${standards}.`,
        };
      }
      if (others.length === 0) return { outcome: 'found', conductor };
      return {
        outcome: 'unknown',
        message: `"${name}" stands under several standards; name one of them: ${standards}.`,
      };
    },
  };
}
