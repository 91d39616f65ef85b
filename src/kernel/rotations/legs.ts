interface Row {
  readonly relative_to: string;
  readonly age_ma: number;
}

interface Run<R> {
  readonly relative_to: string;
  readonly rows: R[];
}

/**
 * Rows of one block as maximal runs of one reference, youngest first: A → B → A makes three. Of rows of one
 * age the one that continues the run comes first, and the one whose reference goes on at the next older age
 * last. Rows of one reference and age must not repeat.
 */
export function rowsToLegs<R extends Row>(rows: readonly R[]): Run<R>[] {
  const runs: Run<R>[] = [];
  const ages = groupByAge(rows);
  ages.forEach((group, i) => {
    const current = runs.at(-1)?.relative_to;
    const ahead = new Set(ages[i + 1]?.map((row) => row.relative_to));
    const rank = ({ relative_to }: R): number =>
      relative_to === current ? 0 : ahead.has(relative_to) ? 2 : 1;
    for (const row of group.sort((a, b) => rank(a) - rank(b) || (a.relative_to < b.relative_to ? -1 : 1))) {
      const run = runs.at(-1);
      if (run?.relative_to === row.relative_to) run.rows.push(row);
      else runs.push({ relative_to: row.relative_to, rows: [row] });
    }
  });
  return runs;
}

/** Rows of one age together, youngest first. */
export function groupByAge<R extends Row>(rows: readonly R[]): R[][] {
  const groups = new Map<number, R[]>();
  for (const row of rows) {
    const group = groups.get(row.age_ma);
    if (group) group.push(row);
    else groups.set(row.age_ma, [row]);
  }
  return [...groups.entries()].sort(([a], [b]) => a - b).map(([, group]) => group);
}
