/** The calculation pages: their address, their name and what they tell. */
export const calculations = [
  {
    slug: 'cover',
    title: 'Required cover',
    line: 'Specified, least and most accepted cover by ACI 318, EN 1992, IS 456, AS 3600, CSA A23.1 or the contract.',
    by: 'ACI 318-19, EN 1992-1-1 with EN 13670, IS 456, AS 3600, CSA A23.1',
  },
  {
    slug: 'lap',
    title: 'Lap length',
    line: 'Tension and compression laps by ACI 318 and EN 1992, and how much shorter a lap may be placed.',
    by: 'ACI 318-19 25.4, 25.5; EN 1992-1-1 8.4, 8.7',
  },
  {
    slug: 'support-height',
    title: 'Support height',
    line: 'How high a chair under a top mat has to be, by the arithmetic of the section.',
    by: 'arithmetic of the section',
  },
  {
    slug: 'clear-distance',
    title: 'Clear distance between bars',
    line: 'The least gap between bars of a layer, between layers and in columns, against bar and aggregate.',
    by: 'ACI 318-19 25.2; EN 1992-1-1 8.2',
  },
  {
    slug: 'readings',
    title: 'Number of readings',
    line: 'How many places to read, what a run without a failure shows, and the factor of a tolerance bound.',
    by: 'element and area, success run, noncentral t',
  },
  {
    slug: 'low-cover',
    title: 'What low cover costs',
    line: 'Time to carbonation and to chloride against what was specified, effective depth, bond and fire cover.',
    by: 'square-root law, Fick’s second law, fib Bulletin 34, EN 1992-1-1',
  },
  {
    slug: 'evaporation',
    title: 'Evaporation rate',
    line: 'How fast fresh concrete loses water in the weather of the hour, and when to protect its surface.',
    by: 'Uno 1998, ACI 305R',
  },
] as const;

export type CalculationSlug = (typeof calculations)[number]['slug'];

/** A calculation of the list by its address. */
export function calculationOf(slug: CalculationSlug): (typeof calculations)[number] {
  const found = calculations.find((calculation) => calculation.slug === slug);
  if (!found) throw new Error(`There is no calculation ${slug}.`);
  return found;
}
