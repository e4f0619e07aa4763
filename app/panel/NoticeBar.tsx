import { commandNamed } from "../command/all.ts";
import { useSession } from "../store/session.ts";
import { Icon } from "./Icon.tsx";

/** What just happened, with a command where one helps; stays until it is closed or another comes. */
export function NoticeBar() {
	const notice = useSession((s) => s.notice);
	const command = notice?.command === undefined ? null : commandNamed(notice.command);
	const close = (): void => useSession.setState({ notice: null });
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
