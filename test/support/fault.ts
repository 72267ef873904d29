import assert from "node:assert/strict";

/**
 * A check for `assert.throws` and `assert.rejects`: the class a user's fault must have, what its message must
 * say, and the house rule that a message is a sentence without a full stop.
 */
export function fault(
  kind: new (message?: string) => Error,
  ...patterns: RegExp[]
): (error: unknown) => true {
  return (error) => {
    assert.ok(error instanceof kind, String(error));
    for (const pattern of patterns) assert.match(error.message, pattern);
    assert.match(error.message, /^\S.*[^.]$/s);
    return true;
  };
}
