import { useEffect, useState } from "react";
import { hearKey } from "./command/keyboard.ts";
import { Activities } from "./panel/Activities.tsx";
import { Dialogs } from "./panel/Dialogs.tsx";
import { Findings } from "./panel/Findings.tsx";
import { Header } from "./panel/Header.tsx";
import { Inputs } from "./panel/Inputs.tsx";
import { InWords } from "./panel/InWords.tsx";
import { NoticeBar } from "./panel/NoticeBar.tsx";
import { Refused } from "./panel/Refused.tsx";
import { Result } from "./panel/Result.tsx";
import { TimeRule } from "./panel/TimeRule.tsx";
import { useNarrow } from "./panel/useNarrow.ts";
import { acceptDrops } from "./platform/files.ts";
import { Stage } from "./scene/Stage.tsx";

/** One stage, one rule of time, what goes in on its left, what comes out on its right; on a narrow screen one below the other. */
export function App() {
	const narrow = useNarrow();
	const [over, setOver] = useState(false);
	useEffect(() => acceptDrops(setOver), []);
	useEffect(() => {
		addEventListener("keydown", hearKey);
		return () => removeEventListener("keydown", hearKey);
	}, []);
	const centre = (
		<div key="centre" className="centre">
			<div className="stage" data-stage>
				<Stage />
			</div>
			<TimeRule />
			<Refused />
			<NoticeBar />
		</div>
	);
	const given = (
		<div key="given" className="given">
			<Activities />
			<Inputs />
		</div>
	);
	const found = (
		<div key="found" className="found">
			<Result />
			{!narrow && <Findings />}
			{!narrow && <InWords />}
		</div>
	);
	const rest = narrow && (
		<div key="rest" className="found">
			<Findings />
			<InWords />
		</div>
	);
	return (
		<>
			<Header />
			<main>{narrow ? [centre, found, given, rest] : [given, centre, found]}</main>
			<footer>Results support a review. They do not replace the project’s human-rating authority, local codes or licensed practice.</footer>
			{over && <div className="drop">Let go to open this layout file</div>}
			<Dialogs />
		</>
	);
}
