/** `1 seat`, `2 seats`. */
export function counted(number: number, one: string, many: string): string {
  return `${number.toLocaleString('en-GB')} ${number === 1 ? one : many}`;
}
