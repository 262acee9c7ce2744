'use strict';

const { chromium } = require('playwright-core');
const { pathToFileURL } = require('url');

/** Opens a page in the browser, looks at it, and prints what was found, with its faults, as one line of JSON. */
async function opened(path, executablePath, look) {
  const browser = await chromium.launch({
    executablePath,
    args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update'],
  });
  try {
    const page = await browser.newPage({ viewport: { width: 1024, height: 700 } });
    const faults = [];
    page.on('pageerror', (error) => faults.push(`error: ${error.message}`));
    page.on('console', (message) => faults.push(`console: ${message.text()}`));
    page.on('request', (request) => {
      if (!request.url().startsWith('file:')) {
        faults.push(`request: ${request.url()}`);
      }
    });
    await page.goto(pathToFileURL(path).href);
    const found = await look(page);
    await page.setViewportSize({ width: 400, height: 700 });
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth > window.innerWidth);
    console.log(JSON.stringify({ faults, ...found, overflow }));
  } catch (error) {
    console.error(error.message);
    process.exitCode = 2;
  } finally {
    await browser.close();
  }
}

module.exports = { opened };
