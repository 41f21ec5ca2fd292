export function demoBook(): Promise<unknown>;
