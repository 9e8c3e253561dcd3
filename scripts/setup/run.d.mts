import type { ChildProcess, SpawnOptions } from 'node:child_process';
export class Companions {
  ended: Promise<void>;
  start(name: string, command: string, args: string[], options?: SpawnOptions): ChildProcess;
  stop(): Promise<void>;
}
export function answers(url: string, seconds?: number): Promise<void>;
