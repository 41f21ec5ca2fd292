/** Leaves the descriptions out of a source of the functions. */
export default function leaveOut(source: string): string;
