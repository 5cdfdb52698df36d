/**
 * A list of every member of a union of names: the compiler refuses one that is missing or that does not exist.
 * Used as `everyName<Union>()(['a', 'b'])`.
 */
export function everyName<Name extends string>() {
  return <const List extends readonly Name[]>(list: List & ([Name] extends [List[number]] ? unknown : never)): List =>
    list;
}
