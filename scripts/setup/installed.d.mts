export function requireNode(): void;
export function ensurePackages(): void;
export function ensurePostgres(): string;
export function ensureChromium(): string;
