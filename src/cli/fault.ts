/**
 * A fault of our own, told so that it can be reported: what went amiss and where
 * in the program, with a warning not to send a confidential manuscript along.
 */
export function faultInWords(problem: unknown): string {
  const { name, message, stack = '' } = problem instanceof Error ? problem
    : new Error(String(problem));
  const where = stack.split('\n').filter((line) => /^\s+at /.test(line)).slice(0, 4);
  return [
    'Tallystick itself failed here; the file may be sound. Please report these lines, with the '
      + 'few words of text that cause it if they are not confidential:',
    `  ${name}: ${message}`,
    ...where,
  ].join('\n');
}
