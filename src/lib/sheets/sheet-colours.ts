/** Colours of the paper sheets: the light face's ink on white, chosen to stay apart in a grey print by line kind as well. */
export const sheetColours = {
	ink: '#1D2A30',
	inkSoft: '#5B6A70',
	faint: '#9AA8AD',
	hair: '#C4CFD3',
	frost: '#E6EEF0',
	white: '#FFFFFF',
	/** Reach circles and cautions. */
	stop: '#B5371F',
	/** Trees and green things. */
	clear: '#2F7A52',
	clearTint: '#E3F0E8',
	sun: '#D98A12',
	sunTint: '#FFF3CF',
	obstacleTint: '#E4E1DA'
} as const;
