/** Starts the page: puts the running session into the document. */
import { render } from "preact";
import { Session } from "./session";

const place = document.getElementById("app");
if (place !== null) {
  place.replaceChildren();
  render(<Session />, place);
}
