// What the test run takes from this folder, as one module to load.

export { getChromium } from "./chromium.js";
export { runChartPageTests } from "./runChartPageTests.js";
export { runEditorTests } from "./runEditorTests.js";
