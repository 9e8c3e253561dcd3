import type { ChildProcess, SpawnOptions } from 'node:child_process';
export class Companions {
  constructor(logFolder?: string);
  ended: Promise<void>;
  start(name: string, command: string, args: string[], options?: SpawnOptions): ChildProcess;
  answers(url: string, seconds?: number): Promise<void>;
  stop(): Promise<void>;
}
export function answers(url: string, seconds?: number): Promise<void>;
