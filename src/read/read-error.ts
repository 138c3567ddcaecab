/**
 * The file cannot be read. The message is whole sentences for the person who
 * gave the file, and says what to do next: "The PDF is protected by a password.
 * Save a copy without the password and read that." It never names the file.
 */
export class ReadError extends Error {
  override readonly name = 'ReadError';
}
