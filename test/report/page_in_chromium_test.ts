/** The page as a browser shows it. Needs Debian's chromium. */
import assert from "node:assert/strict";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { type Browser, chromium, type Page } from "playwright-core";
import { reportPage } from "../../lib/report/page.ts";
import { plotFigures } from "../../lib/report/plots.ts";
import type { ReportInput } from "../../lib/report/report_input.ts";
import { reportSample } from "../support/report_sample.ts";

async function withBrowser(work: (browser: Browser) => Promise<void>): Promise<void> {
  const browser = await chromium.launch({
    executablePath: "/usr/bin/chromium",
    args: [
      "--no-sandbox",
      "--disable-gpu",
      "--no-first-run",
      "--disable-background-networking",
      "--disable-component-update",
      "--disable-sync",
    ],
  });
  try {
    await work(browser);
  } finally {
    await browser.close();
  }
}

/** Opens the report of an input from a file of its own, as a reader would. */
async function visit(
  browser: Browser,
  input: ReportInput,
  look: (page: Page) => Promise<void>,
): Promise<void> {
  const folder = mkdtempSync(join(tmpdir(), "nearkin-page-"));
  try {
    const file = join(folder, "report.html");
    writeFileSync(file, reportPage(input));
    const page = await browser.newPage({ viewport: { width: 1280, height: 900 } });
    const requests: string[] = [], complaints: string[] = [];
    page.on("request", (request) => requests.push(request.url()));
    page.on("console", (message) => complaints.push(message.text()));
    page.on("pageerror", (error) => complaints.push(String(error)));
    page.on("dialog", (dialog) => complaints.push(dialog.message()));
    await page.goto(pathToFileURL(file).href);
    await look(page);
    assert.deepEqual(requests, [pathToFileURL(file).href]);
    assert.deepEqual(complaints, []);
    await page.close();
  } finally {
    rmSync(folder, { recursive: true });
  }
}

Deno.test("the report in a browser", async (test) => {
  const sample = reportSample();
  const hostile = '<img src=x onerror=alert(1)><script>alert(2)</script>&"';
  const hostileSample = { ...sample, labels: sample.areas.class.map(() => hostile) };
  await withBrowser(async (browser) => {
    await test.step("it opens complete and without a complaint", () =>
      visit(browser, sample, async (page) => {
        assert.ok(await page.getByRole("heading", { level: 1 }).isVisible());
        assert.equal(await page.locator("h1").innerText(), sample.results.verdict.headline);
        assert.equal(await page.locator("figure svg").count(), 6);
      }));

    await test.step("it fits a desk, a phone and paper", () =>
      visit(browser, sample, async (page) => {
        for (const width of [1280, 390]) {
          await page.setViewportSize({ width, height: 900 });
          const overhang = await page.evaluate<number>(
            "document.documentElement.scrollWidth - document.documentElement.clientWidth",
          );
          assert.equal(overhang, 0, `${width} px`);
        }
        const pdf = await page.pdf({ preferCSSPageSize: true });
        assert.ok(pdf.length > 20_000);
      }));

    await test.step("names from a file are shown and do nothing", () =>
      visit(browser, hostileSample, async (page) => {
        assert.equal(await page.locator("#areas tbody th").first().innerText(), hostile);
      }));

    await test.step("its figures are proper XML", async () => {
      const page = await browser.newPage();
      for (const [name, svg] of plotFigures(hostileSample)) {
        const faults = await page.evaluate<number, string>(
          (text) =>
            new DOMParser().parseFromString(text, "image/svg+xml")
              .querySelectorAll("parsererror").length,
          svg,
        );
        assert.equal(faults, 0, name);
      }
    });

    await test.step("100,000 areas open and are drawn", () =>
      visit(browser, reportSample({ columns: 400, rows: 250, bends: 1 }), async (page) => {
        assert.ok(await page.locator("h1").isVisible());
        await page.screenshot({ clip: { x: 0, y: 700, width: 1280, height: 900 } });
      }));
  });
});
