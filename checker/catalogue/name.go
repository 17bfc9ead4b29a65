package catalogue

import "unicode/utf8"

// maxName is the longest designation that is looked at, in bytes. Longer texts
// name no section.
const maxName = 64

// compact appends the compact form of a designation to dst: capitals, digits
// and points only, with an X between numbers and a hyphen where one stood
// between digits. A decimal comma becomes a point. It reports false if the text
// is too long or holds a character that no designation has.
func compact(dst []byte, text string) ([]byte, bool) {
	if len(text) > maxName {
		return nil, false
	}
	gap := false // a blank has been passed
	for i := 0; i < len(text); {
		c := text[i]
		size := 1
		switch {
		case c >= 'a' && c <= 'z':
			c -= 'a' - 'A'
		case c >= 'A' && c <= 'Z', c >= '0' && c <= '9', c == '.':
		case c == ' ' || c == '\t' || c == '_' || c == '\n' || c == '\r':
			gap = true
			i++
			continue
		case c == ',':
			c = '.'
		case c == '/' || c == '*':
			c = 'X'
		case c == '-':
			if before := i+1 < len(text) && (digit(text[i+1]) || text[i+1] == '.'); before {
				if len(dst) == 0 || dst[len(dst)-1] == 'X' || gap {
					return nil, false // a minus sign
				}
				if digit(dst[len(dst)-1]) {
					break // between digits: part of a standard's number
				}
			}
			i++
			continue
		default:
			var r rune
			r, size = utf8.DecodeRuneInString(text[i:])
			switch r {
			case '½':
				if len(dst) > 0 && gap && (digit(dst[len(dst)-1]) || dst[len(dst)-1] == '.') {
					return nil, false // 1 ½
				}
				dst, gap = append(dst, "1X2"...), false
				i += size
				continue
			case '×', '✕', '⨯':
				c = 'X'
			case 'Ø', 'ø', '⌀', '\u00a0', '\u202f', '\u2009':
				gap = true
				i += size
				continue
			default:
				return nil, false
			}
		}
		// Two numbers with nothing but a blank between them are two dimensions:
		// "SHS 100 100 5"; joining them would invent a number.
		if gap && len(dst) > 0 && (digit(c) || c == '.') && (digit(dst[len(dst)-1]) || dst[len(dst)-1] == '.') {
			dst = append(dst, 'X')
		}
		gap = false
		dst = append(dst, c)
		i += size
	}
	return dst, len(dst) > 0
}

// digit tells whether c is a decimal digit.
func digit(c byte) bool { return c >= '0' && c <= '9' }
