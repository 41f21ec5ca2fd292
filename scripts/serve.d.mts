export function serve(folder: string, port: number): Promise<{ origin: string; close: () => Promise<void> }>;
