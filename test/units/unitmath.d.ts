/** The part of unitmath 0.8 that the tests use as an oracle; the package has no types of its own. */
declare module 'unitmath' {
  interface Unit {
    to(unit: string): Unit;
    add(other: Unit): Unit;
    mul(factor: number): Unit;
    getValue(): number;
  }
  export default function unit(value: string | number, unit?: string): Unit;
}
