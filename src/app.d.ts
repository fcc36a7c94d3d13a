declare global {
	namespace App {
		interface PageState {
			/** Sheets standing open, outermost first: the back button closes the last one. */
			sheets?: readonly string[];
		}
	}
}

export {};
