/** The page's start: connects its parts to the editor. */
import { createChartPage } from "./frame/chartPage.js";
import { connectHost } from "./host.js";
import { watchTheme } from "./theme/theme.js";

const root = document.getElementById("chart");
if (root !== null) {
  const host = connectHost();
  const page = createChartPage(root, host);
  host.listen(page.receive);
  watchTheme(document, page.redraw);
  watchPixelRatio(page.redraw);
}

/** A change of zoom or screen changes the pixels under an unchanged page. */
function watchPixelRatio(onChange: () => void): void {
  matchMedia(`(resolution: ${window.devicePixelRatio}dppx)`).addEventListener(
    "change",
    () => {
      onChange();
      watchPixelRatio(onChange);
    },
    { once: true },
  );
}
