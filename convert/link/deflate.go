package link

import (
	"math/bits"
	"slices"
)

// deflate packs text as DEFLATE (RFC 1951) with a preset dictionary, in one
// block of fixed codes: for so short a text no other code pays for its own
// table. The library's writer, which chooses among all of them, makes a fiftieth
// of what a phone has to load and takes thirty times as long; its reader is what
// unpacks, and the tests hold the two against each other.
func deflate(text, dictionary []byte) []byte {
	p := packer{data: slices.Concat(dictionary, text)}
	p.before = make([]int32, len(p.data))
	p.write(1, 1) // the last block
	p.write(1, 2) // of fixed codes
	for at := range dictionary {
		p.remember(at)
	}
	for at := len(dictionary); at < len(p.data); {
		length, distance := p.longest(at)
		if later, _ := p.longest(at + 1); length > 0 && later > length {
			length = 0 // a literal first, then the longer match
		}
		if length == 0 {
			p.literal(int(p.data[at]))
			length = 1
		} else {
			p.match(length, distance)
		}
		for end := at + length; at < end; at++ {
			p.remember(at)
		}
	}
	p.literal(endOfBlock)
	p.write(0, 7) // fills the last byte
	return p.out
}

const (
	leastMatch    = 3
	longestMatch  = 258
	farthestMatch = 1 << 15
	endOfBlock    = 256
	mostTries     = 64 // earlier places that are looked at for a match
)

// packer packs data from left to right.
type packer struct {
	data    []byte
	last    [1 << hashBits]int32 // where three bytes of a hash stood last, plus 1
	before  []int32              // where such bytes stood before that, plus 1, by place
	out     []byte
	pending uint64 // bits that make no byte yet
	count   int
}

const hashBits = 12

func (p *packer) hash(at int) uint32 {
	b := p.data[at:]
	return (uint32(b[0]) | uint32(b[1])<<8 | uint32(b[2])<<16) * 0x9e3779b1 >> (32 - hashBits)
}

// remember makes a place known for later matches.
func (p *packer) remember(at int) {
	if at+leastMatch > len(p.data) {
		return
	}
	h := p.hash(at)
	p.before[at] = p.last[h]
	p.last[h] = int32(at + 1)
}

// longest returns the longest match with what stood before, the nearest of
// several; length is 0 where there is none.
func (p *packer) longest(at int) (length, distance int) {
	if at+leastMatch > len(p.data) {
		return 0, 0
	}
	from := int(p.last[p.hash(at)]) - 1
	for tries := 0; from >= 0 && at-from <= farthestMatch && tries < mostTries; tries++ {
		n := 0
		for n < longestMatch && at+n < len(p.data) && p.data[from+n] == p.data[at+n] {
			n++
		}
		if n >= leastMatch && n > length {
			length, distance = n, at-from
		}
		from = int(p.before[from]) - 1
	}
	return length, distance
}

// literal writes a byte, the end of the block, or the code of a length.
func (p *packer) literal(symbol int) {
	switch {
	case symbol < 144:
		p.code(0x30+symbol, 8)
	case symbol < 256:
		p.code(0x190+symbol-144, 9)
	case symbol < 280:
		p.code(symbol-256, 7)
	default:
		p.code(0xc0+symbol-280, 8)
	}
}

// match writes a length and a distance.
func (p *packer) match(length, distance int) {
	symbol, extra, width := split(length-leastMatch, 4)
	if length == longestMatch {
		symbol, extra, width = 28, 0, 0
	}
	p.literal(257 + symbol)
	p.write(extra, width)
	symbol, extra, width = split(distance-1, 2)
	p.code(symbol, 5)
	p.write(extra, width)
}

// split parts a length or a distance, counted from 0, into its symbol and the
// bits that follow it. The symbols double their reach after every group.
func split(value, group int) (symbol, extra, width int) {
	if value < 2*group {
		return value, 0, 0
	}
	width = bits.Len(uint(value)) - bits.Len(uint(group))
	return width*group + value>>width, value & (1<<width - 1), width
}

// code writes a Huffman code, which goes from its highest bit down.
func (p *packer) code(value, width int) {
	p.write(int(bits.Reverse16(uint16(value))>>(16-width)), width)
}

// write writes bits from the lowest up.
func (p *packer) write(value, width int) {
	p.pending |= uint64(value) << p.count
	for p.count += width; p.count >= 8; p.count -= 8 {
		p.out = append(p.out, byte(p.pending))
		p.pending >>= 8
	}
}
