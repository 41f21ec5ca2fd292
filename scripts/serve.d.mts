export function serve(
  folder: string,
  port: number,
  secure?: { cert: string | Buffer; key: string | Buffer },
): Promise<{ origin: string; close: () => Promise<void> }>;
