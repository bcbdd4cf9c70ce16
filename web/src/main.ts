import demonstration from "../demonstration/share.json";
import { openCore } from "./core/open";

const core = await openCore();
const sheet = document.querySelector<HTMLElement>("#sheet")!;
const answer = document.createElement("pre");
answer.id = "answer";
sheet.dataset.core = core.kind;
answer.textContent = JSON.stringify(JSON.parse(await core.answer(JSON.stringify(demonstration))), null, 2);
sheet.append(answer);
