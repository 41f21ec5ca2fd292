import type { Book } from '../src/workbench/files/book';

export function demoBook(): Promise<Book>;
export function demoFile(): Promise<Uint8Array>;
