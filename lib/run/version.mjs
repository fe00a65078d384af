// No imports and old syntax only: this file must also load on a Node that is too old for the rest.

/**
 * Says in a sentence what is wrong with a Node version, or null when it will do.
 * Keep the bounds equal to "engines" in package.json.
 * @param {string} version such as "20.19.0" or "v22.3.1"
 * @returns {string | null}
 */
export function nodeVersionProblem(version) {
  const parts = String(version).replace(/^v/, "").split(".");
  const major = Number(parts[0]);
  const minor = Number(parts[1]);
  const fits = (major === 20 && minor >= 19) || major === 21 || major === 22;
  if (fits) return null;
  return `Dwellbook needs Node 20.19 or later, below 23; this is Node ${parts.join(".")}.`;
}
