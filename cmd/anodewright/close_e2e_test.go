//go:build e2e && !ci && linux

package main_test

import (
	"bufio"
	"encoding/binary"
	"fmt"
	"io"
	"net"
	"strings"
)

// askToClose sends a window the message WM_DELETE_WINDOW, as a window manager
// does when its close button is pressed (X Window System Protocol, and ICCCM
// section 4.2.8). xdotool cannot: it only destroys windows.
func askToClose(display string, window uint32) error {
	conn, err := net.Dial("unix", "/tmp/.X11-unix/X"+strings.TrimPrefix(display, ":"))
	if err != nil {
		return err
	}
	defer conn.Close()
	x := &xClient{conn: conn, in: bufio.NewReader(conn)}
	if err := x.greet(); err != nil {
		return err
	}
	protocols, err := x.atom("WM_PROTOCOLS")
	if err != nil {
		return err
	}
	deletion, err := x.atom("WM_DELETE_WINDOW")
	if err != nil {
		return err
	}

	const sendEvent, clientMessage, words = 25, 33, 32
	put := binary.LittleEndian.AppendUint32
	request := []byte{sendEvent, 0, 11, 0} // 11 units of 4 bytes
	request = put(request, window)         // to whom
	request = put(request, 0)              // whatever it listens to
	request = append(request, clientMessage, words, 0, 0)
	request = put(request, window)
	request = put(request, protocols)
	request = put(request, deletion)
	request = append(request, make([]byte, 16)...) // time: now; the rest unused
	if _, err := conn.Write(request); err != nil {
		return err
	}
	// The answer to one more question shows that the message went through.
	_, err = x.atom("WM_PROTOCOLS")
	return err
}

// xClient is a connection to an X server, just enough to look up atoms.
type xClient struct {
	conn io.Writer
	in   *bufio.Reader
}

// greet opens the connection, without authorisation.
func (x *xClient) greet() error {
	const littleEndian, protocol = 'l', 11
	if _, err := x.conn.Write([]byte{littleEndian, 0, protocol, 0, 0, 0, 0, 0, 0, 0, 0, 0}); err != nil {
		return err
	}
	var head [8]byte
	if _, err := io.ReadFull(x.in, head[:]); err != nil {
		return err
	}
	rest := 4 * int(binary.LittleEndian.Uint16(head[6:]))
	if _, err := x.in.Discard(rest); err != nil {
		return err
	}
	if head[0] != 1 {
		return fmt.Errorf("the X server refused the connection (%d)", head[0])
	}
	return nil
}

// atom returns the server's number for a name.
func (x *xClient) atom(name string) (uint32, error) {
	const internAtom = 16
	padded := (len(name) + 3) / 4 * 4
	request := []byte{internAtom, 0}
	request = binary.LittleEndian.AppendUint16(request, uint16(2+padded/4))
	request = binary.LittleEndian.AppendUint16(request, uint16(len(name)))
	request = append(request, 0, 0)
	request = append(request, name...)
	request = append(request, make([]byte, padded-len(name))...)
	if _, err := x.conn.Write(request); err != nil {
		return 0, err
	}
	var reply [32]byte
	if _, err := io.ReadFull(x.in, reply[:]); err != nil {
		return 0, err
	}
	if reply[0] != 1 {
		return 0, fmt.Errorf("the X server answered with error %d", reply[1])
	}
	return binary.LittleEndian.Uint32(reply[8:]), nil
}
