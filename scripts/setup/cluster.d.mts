export class Cluster {
  constructor(options: {
    binaries: string;
    folder: string;
    port: number;
    password: string;
    durable?: boolean;
  });
  options: { binaries: string; folder: string; port: number; password: string; durable: boolean };
  url(database: string, user?: string, password?: string): string;
  create(): void;
  isRunning(): boolean;
  start(): void;
  stop(mode?: 'fast' | 'immediate'): void;
}
