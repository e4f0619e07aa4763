import { useEffect } from "react";
import { commandNamed } from "../command/all.ts";
import { useSession } from "../store/session.ts";
import { Icon } from "./Icon.tsx";

/** How long a notice that asks for nothing stays, ms. */
const PASSING_MS = 8000;

/** What just happened. With a command to choose it stays until it is closed, else it passes. */
export function NoticeBar() {
	const notice = useSession((s) => s.notice);
	const command = notice?.command === undefined ? null : commandNamed(notice.command);
	const close = (): void => useSession.setState({ notice: null });
	useEffect(() => {
		if (notice === null || notice.command !== undefined) return;
		const timer = setTimeout(() => useSession.setState({ notice: null }), PASSING_MS);
		return () => clearTimeout(timer);
	}, [notice]);
	return (
		<div className="notice" role="status" hidden={notice === null}>
			{notice && (
				<>
					<span>{notice.text}</span>
					{command && (
						<button
							type="button"
							onClick={() => {
								close();
								command.run();
							}}
						>
							{command.name()}
						</button>
					)}
					<button type="button" className="quiet square" aria-label="Close this notice" onClick={close}>
						<Icon name="close" />
					</button>
				</>
			)}
		</div>
	);
}
