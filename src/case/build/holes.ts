/** The list where it has no hole; undefined where something in it could not be read. */
export function complete<Value>(list: readonly (Value | undefined)[]): readonly Value[] | undefined {
  return list.every((entry) => entry !== undefined) ? list : undefined;
}
