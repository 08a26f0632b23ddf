/**
 * Something outside the program stands in the way: a missing package, a port in use, a folder that cannot be read.
 * The message is one whole sentence that says what a person can do; launchers print it alone, without a stack.
 */
export class Obstacle extends Error {
  override readonly name = 'Obstacle';
}
