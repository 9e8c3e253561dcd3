import type { Reporter, TestModule } from 'vitest/node';

interface Row {
  passed: number;
  failed: number;
  sources: Set<string>;
  memory: number;
}

/** Prints, after the reference checks, what they rest on: topic, checks, sources, how many from memory. */
export default class SummaryReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[]): void {
    const rows = new Map<string, Row>();
    for (const module of modules) {
      for (const test of module.children.allTests()) {
        // A name is topic | place in the standard | provenance | what (see reference-values.ts).
        const [topic = '', source, provenance, what] = test.name.split(' | ');
        const key = what === undefined ? '(no source named)' : topic;
        const row = rows.get(key) ?? { passed: 0, failed: 0, sources: new Set<string>(), memory: 0 };
        if (test.result().state === 'passed') row.passed += 1;
        else row.failed += 1;
        if (source) row.sources.add(source);
        if (provenance === 'memory') row.memory += 1;
        rows.set(key, row);
      }
    }
    const cells = [['topic', 'checks', 'not passed', 'sources', 'from memory']];
    const total = { checks: 0, failed: 0, sources: new Set<string>(), memory: 0 };
    for (const [topic, row] of [...rows].sort(([a], [b]) => a.localeCompare(b))) {
      const checks = row.passed + row.failed;
      cells.push([topic, checks, row.failed, row.sources.size, row.memory].map(String));
      total.checks += checks;
      total.failed += row.failed;
      total.memory += row.memory;
      for (const source of row.sources) total.sources.add(source);
    }
    cells.push(['total', total.checks, total.failed, total.sources.size, total.memory].map(String));
    const widths = (cells[0] ?? []).map((_, column) =>
      Math.max(...cells.map((line) => line[column]?.length ?? 0)),
    );
    const text = cells.map((line) =>
      line
        .map((cell, column) =>
          column === 0 ? cell.padEnd(widths[column] ?? 0) : cell.padStart(widths[column] ?? 0),
        )
        .join('  '),
    );
    process.stdout.write(`\nReference values\n${text.join('\n')}\n`);
  }
}
