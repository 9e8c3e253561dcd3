export function useLocalEnvironment(): void;
