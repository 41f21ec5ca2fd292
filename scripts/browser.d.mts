export function findBrowser(): string | null;
export const QUIET_SWITCHES: string[];
