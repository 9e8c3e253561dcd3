import { readFileSync } from 'node:fs';
import { basename } from 'node:path';
import type { Reporter, TestModule } from 'vitest/node';

interface Published {
  standard?: string;
  clause?: string;
  source: string;
  provenance: string;
}

const columns = ['topic', 'checks', 'failed', 'values', 'sources', 'from memory'];

function valuesOf(topic: string): Published[] {
  const text = readFileSync(new URL(`./data/${topic}.json`, import.meta.url), 'utf8');
  return (JSON.parse(text) as { records: Published[] }).records;
}

/** Prints, after the reference checks, what they rest on: topic, checks, values, sources, how many from memory. */
export default class SummaryReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[]): void {
    const rows = [...modules]
      .sort((a, b) => a.moduleId.localeCompare(b.moduleId))
      .map((module) => {
        const topic = basename(module.moduleId, '.test.ts');
        const tests = [...module.children.allTests()];
        const values = valuesOf(topic);
        return {
          topic: topic.replaceAll('-', ' '),
          checks: tests.length,
          failed: tests.filter((test) => test.result().state !== 'passed').length,
          values: values.length,
          sources: new Set(
            values.map(({ standard, clause, source }) => `${standard ?? source} ${clause ?? ''}`),
          ),
          memory: values.filter(({ provenance }) => provenance === 'memory').length,
        };
      });
    const sum = (of: (row: (typeof rows)[number]) => number) =>
      rows.reduce((total, row) => total + of(row), 0);
    const lines = [
      columns,
      ...rows.map((row) => [
        row.topic,
        ...[row.checks, row.failed, row.values, row.sources.size, row.memory].map(String),
      ]),
      [
        'total',
        ...[
          sum((row) => row.checks),
          sum((row) => row.failed),
          sum((row) => row.values),
          new Set(rows.flatMap((row) => [...row.sources])).size,
          sum((row) => row.memory),
        ].map(String),
      ],
    ];
    const widths = columns.map((_, column) => Math.max(...lines.map((line) => line[column]?.length ?? 0)));
    const text = lines.map((line) =>
      line.map((cell, column) =>
        column === 0 ? cell.padEnd(widths[0] ?? 0) : cell.padStart(widths[column] ?? 0),
      ),
    );
    process.stdout.write(`\nReference values\n${text.map((line) => line.join('  ')).join('\n')}\n`);
  }
}
