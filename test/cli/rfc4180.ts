/** The records of a CSV text read strictly by RFC 4180: CRLF after each, quotes doubled within quotes, none elsewhere. */
export function readCsv(text: string): string[][] {
	const records: string[][] = [];
	let record: string[] = [];
	let at = 0;
	const expect = (what: string): void => {
		if (!text.startsWith(what, at))
			throw new SyntaxError(`expected ${JSON.stringify(what)} at ${at}, got ${JSON.stringify(text.slice(at, at + 20))}`);
		at += what.length;
	};
	while (at < text.length) {
		if (text[at] === '"') {
			let field = "";
			at++;
			for (;;) {
				const end = text.indexOf('"', at);
				if (end < 0) throw new SyntaxError("a quoted field is not closed");
				field += text.slice(at, end);
				at = end + 1;
				if (text[at] !== '"') break;
				field += '"';
				at++;
			}
			record.push(field);
		} else {
			const field = /^[^",\r\n]*/.exec(text.slice(at, at + 1000))?.[0] ?? "";
			at += field.length;
			record.push(field);
		}
		if (text[at] === ",") {
			at++;
			if (text[at] === "\r") {
				record.push("");
				expect("\r\n");
			} else continue;
		} else expect("\r\n");
		records.push(record);
		record = [];
	}
	if (record.length > 0) throw new SyntaxError("the last record does not end");
	return records;
}
