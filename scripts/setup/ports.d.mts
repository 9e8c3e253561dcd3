export function isFree(port: number): Promise<boolean>;
export function freePort(): Promise<number>;
export function requireFree(port: number, who: string, variable: string): Promise<void>;
