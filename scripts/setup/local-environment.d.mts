export function setLocalEnvironment(): void;
