/** What a measurement costs, in milliseconds: the least of several runs, which noise disturbs least. */
export async function costOf(work: () => unknown, runs = 7): Promise<number> {
  let least = Infinity;
  for (let run = 0; run < runs; run++) {
    const start = performance.now();
    await work();
    least = Math.min(least, performance.now() - start);
  }
  return least;
}

/** A ratio as it is printed: "24.3". */
export function shown(ratio: number): string {
  return ratio.toFixed(ratio < 10 ? 2 : 1);
}

/** A table of ratios with its heading, in plain text. */
export function tableOf(heading: string, rows: readonly (readonly [string, number])[]): string {
  const width = Math.max(...rows.map(([label]) => label.length));
  return [heading, ...rows.map(([label, ratio]) => `  ${label.padEnd(width)}  ${shown(ratio)}`)].join('\n');
}
