import assert from "node:assert/strict";
import { completeProj } from "../../lib/project/proj_string.ts";

Deno.test("completeProj() writes angles in decimal degrees", () => {
  const text = completeProj(`+proj=lcc +lat_1=36d10 +lat_2=34d20'30" +lat_0=33d45'N +lon_0=79dW`);
  assert.match(text, /\+lat_1=36\.1666/);
  assert.match(text, /\+lat_2=34\.34166/);
  assert.match(text, /\+lat_0=33\.75 /);
  assert.match(text, /\+lon_0=-79 /);
  assert.match(completeProj("+proj=laea +lat_0=-12d30"), /\+lat_0=-12\.5/);
});

Deno.test("completeProj() sets origins that are not given to 0, and a cone's to its only parallel", () => {
  assert.equal(
    completeProj("+proj=laea +lat_0=50 +x_0=7"),
    "+proj=laea +lat_0=50 +x_0=7 +lon_0=0 +y_0=0",
  );
  assert.match(completeProj("+proj=lcc +lat_1=40"), /\+lat_0=40/);
  assert.match(completeProj("+proj=lcc +lat_1=40 +lat_2=50"), /\+lat_0=0/);
});

Deno.test("completeProj() writes Web Mercator as the sphere it is computed on", () => {
  assert.match(completeProj("+proj=webmerc +ellps=WGS84"), /^\+proj=merc \+a=6378137 \+b=6378137 /);
});
