import assert from "node:assert/strict";
import { markup, type Part, trusted } from "../../lib/report/markup.ts";

Deno.test("markup() escapes every text, in elements and in attributes", () => {
  const name = `<script>alert("a" & 'b')</script>`;
  const escaped = "&lt;script&gt;alert(&quot;a&quot; &amp; &#39;b&#39;)&lt;/script&gt;";
  assert.equal(
    markup`<b title="${name}">${name}</b>`.markup,
    `<b title="${escaped}">${escaped}</b>`,
  );
});

Deno.test("markup() takes markup as it is, joins lists and leaves out null and false", () => {
  const items: Part[] = ["a<", markup`<i>b</i>`, null, false, 3, [trusted("<br>"), "c"]];
  assert.equal(markup`<p>${items}</p>`.markup, "<p>a&lt;<i>b</i>3<br>c</p>");
});

Deno.test("markup() replaces what cannot stand in XML at all", () => {
  assert.equal(markup`${"a\u0000b\u001Fc\uFFFFd\tE\n"}`.markup, "a\uFFFDb\uFFFDc\uFFFDd\tE\n");
  assert.equal(markup`${"lone \uD800 half"}`.markup, "lone \uFFFD half");
});
