import assert from "node:assert/strict";
import { pinnedPackages } from "./pinned_packages.ts";

const json = JSON.stringify({
  imports: { "a": "npm:a@1.2.3", "@s/b": "npm:@s/b@4.5.6", "t": "npm:t@1.0.0" },
});
const lock = JSON.stringify({
  npm: {
    "a@1.2.3": {},
    "@s/b@4.5.6_a@1.2.3": {},
    "t@1.0.0": {},
    "@x/deep@7.8.9": {},
    "twice@1.0.0": {},
    "twice@2.0.0": {},
  },
});

Deno.test("pinnedPackages() takes direct packages from deno.json and the others from deno.lock", () => {
  assert.deepEqual(pinnedPackages(json, lock), {
    dependencies: { "a": "1.2.3", "@s/b": "4.5.6", "t": "1.0.0" },
    overrides: { "@x/deep": "7.8.9" },
  });
});

Deno.test("pinnedPackages() leaves out what the binary does not use", () => {
  assert.deepEqual(Object.keys(pinnedPackages(json, lock, ["t"]).dependencies), ["a", "@s/b"]);
});

Deno.test("pinnedPackages() refuses an import without an exact version", () => {
  const loose = JSON.stringify({ imports: { "a": "npm:a@^1.2.3" } });
  assert.throws(
    () => pinnedPackages(loose, lock),
    /import a .* npm:a@\^1\.2\.3 is not npm:a@X\.Y\.Z/,
  );
});
