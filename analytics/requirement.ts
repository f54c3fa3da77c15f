/** Thrown on wrong use of any analytics function; worded `<function> requires <condition>`. */
export class RequirementError extends Error {
  override readonly name = 'RequirementError';
}

/**
 * Stops wrong use. The message reads `<functionName> requires <condition>`.
 *
 * @throws {RequirementError} where `holds` is false
 */
export function requireThat(holds: boolean, functionName: string, condition: string): asserts holds {
  if (!holds) throw new RequirementError(`${functionName} requires ${condition}`);
}

export function requireConfidence(confidence: number, functionName: string): void {
  requireThat(confidence > 0 && confidence < 1, functionName, 'a confidence between 0 and 1');
}

export function requireWhole(value: number, functionName: string, name: string): void {
  requireThat(Number.isSafeInteger(value) && value >= 0, functionName, `${name} to be a whole number ≥ 0`);
}
