package report

import (
	"bufio"
	"encoding/json"
	"fmt"
	"io"
	"net/url"
	"os"
	"os/exec"
	"path/filepath"
	"sync"
	"testing"
	"time"
)

// browser drives a headless Chromium over a pair of pipes, in the protocol
// that it documents for its own tools (Chrome DevTools Protocol).
type browser struct {
	t       *testing.T
	in      io.Writer
	mu      sync.Mutex
	next    int
	session string
	waiting map[int]chan reply
	events  []event
}

type reply struct {
	ID     int             `json:"id"`
	Result json.RawMessage `json:"result"`
	Error  *struct {
		Message string `json:"message"`
	} `json:"error"`
}

type event struct {
	Method string          `json:"method"`
	Params json.RawMessage `json:"params"`
}

// chromium starts a browser, or skips aloud where there is none; in CI its
// absence is a failure.
func chromium(t *testing.T) *browser {
	t.Helper()
	path := ""
	for _, name := range []string{"chromium", "chromium-browser", "google-chrome"} {
		if p, err := exec.LookPath(name); err == nil && path == "" {
			path = p
		}
	}
	if path == "" {
		if os.Getenv("RUNGWRIGHT_CI") == "1" {
			t.Fatal("no Chromium: the report cannot be looked at")
		}
		t.Skip("NOT CHECKED in a browser: no Chromium on this machine")
	}
	toBrowser, in, err := os.Pipe()
	if err != nil {
		t.Fatal(err)
	}
	out, fromBrowser, err := os.Pipe()
	if err != nil {
		t.Fatal(err)
	}
	home, err := os.MkdirTemp("", "rungwright-browser")
	if err != nil {
		t.Fatal(err)
	}
	c := exec.Command(path, "--headless", "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking",
		"--disable-component-update", "--disable-sync", "--hide-scrollbars", "--remote-debugging-pipe", "--user-data-dir="+home, "about:blank")
	c.ExtraFiles = []*os.File{toBrowser, fromBrowser}
	if err := c.Start(); err != nil {
		t.Fatal(err)
	}
	toBrowser.Close()
	fromBrowser.Close()
	b := &browser{t: t, in: in, waiting: map[int]chan reply{}}
	go b.read(out)
	t.Cleanup(func() {
		in.Close()
		gone := time.AfterFunc(5*time.Second, func() { c.Process.Kill() })
		c.Wait()
		gone.Stop()
		os.RemoveAll(home)
	})
	b.attach()
	return b
}

// read sorts what the browser says into replies and events.
func (b *browser) read(from io.Reader) {
	r := bufio.NewReaderSize(from, 1<<20)
	for {
		line, err := r.ReadBytes(0)
		if err != nil {
			return
		}
		line = line[:len(line)-1]
		var a reply
		if json.Unmarshal(line, &a) == nil && a.ID > 0 {
			b.mu.Lock()
			c := b.waiting[a.ID]
			delete(b.waiting, a.ID)
			b.mu.Unlock()
			if c != nil {
				c <- a
			}
			continue
		}
		var e event
		if json.Unmarshal(line, &e) == nil {
			b.mu.Lock()
			b.events = append(b.events, e)
			b.mu.Unlock()
		}
	}
}

// call asks the browser for something and reads the answer into into.
func (b *browser) call(method string, params map[string]any, into any) {
	b.t.Helper()
	if params == nil {
		params = map[string]any{}
	}
	b.mu.Lock()
	b.next++
	id := b.next
	c := make(chan reply, 1)
	b.waiting[id] = c
	b.mu.Unlock()
	text, err := json.Marshal(map[string]any{"id": id, "method": method, "params": params, "sessionId": b.session})
	if b.session == "" {
		text, err = json.Marshal(map[string]any{"id": id, "method": method, "params": params})
	}
	if err != nil {
		b.t.Fatal(err)
	}
	if _, err := b.in.Write(append(text, 0)); err != nil {
		b.t.Fatal(err)
	}
	select {
	case a := <-c:
		if a.Error != nil {
			b.t.Fatalf("%s: %s", method, a.Error.Message)
		}
		if into != nil {
			if err := json.Unmarshal(a.Result, into); err != nil {
				b.t.Fatal(err)
			}
		}
	case <-time.After(60 * time.Second):
		b.t.Fatalf("%s: no answer from the browser", method)
	}
}

// attach opens a page and listens to it.
func (b *browser) attach() {
	var target struct{ TargetID string }
	b.call("Target.createTarget", map[string]any{"url": "about:blank"}, &target)
	var session struct{ SessionID string }
	b.call("Target.attachToTarget", map[string]any{"targetId": target.TargetID, "flatten": true}, &session)
	b.session = session.SessionID
	for _, domain := range []string{"Page", "Runtime", "Log", "Network", "Audits"} {
		b.call(domain+".enable", nil, nil)
	}
}

// open shows a document from a file and waits until it is loaded.
func (b *browser) open(document []byte) {
	b.t.Helper()
	file := filepath.Join(b.t.TempDir(), "report.html")
	if err := os.WriteFile(file, document, 0o600); err != nil {
		b.t.Fatal(err)
	}
	b.mu.Lock()
	b.events = nil
	b.mu.Unlock()
	b.call("Page.navigate", map[string]any{"url": (&url.URL{Scheme: "file", Path: filepath.ToSlash(file)}).String()}, nil)
	for end := time.Now().Add(30 * time.Second); !b.saw("Page.loadEventFired"); time.Sleep(10 * time.Millisecond) {
		if time.Now().After(end) {
			b.t.Fatal("the report does not load")
		}
	}
}

// seen are the events of a kind since the page was opened.
func (b *browser) seen(method string) []event {
	b.mu.Lock()
	defer b.mu.Unlock()
	var out []event
	for _, e := range b.events {
		if e.Method == method {
			out = append(out, e)
		}
	}
	return out
}

func (b *browser) saw(method string) bool { return len(b.seen(method)) > 0 }

// eval runs script in the page and reads its value.
func (b *browser) eval(script string, into any) {
	b.t.Helper()
	var got struct {
		Result           struct{ Value json.RawMessage }
		ExceptionDetails json.RawMessage
	}
	b.call("Runtime.evaluate", map[string]any{"expression": script, "returnByValue": true}, &got)
	if len(got.ExceptionDetails) > 0 {
		b.t.Fatalf("%s: %s", script, got.ExceptionDetails)
	}
	if err := json.Unmarshal(got.Result.Value, into); err != nil {
		b.t.Fatalf("%s: %v in %s", script, err, got.Result.Value)
	}
}

// look sets the size of the window and what the reader prefers.
func (b *browser) look(width, height int, media, scheme string) {
	b.t.Helper()
	b.call("Emulation.setDeviceMetricsOverride", map[string]any{"width": width, "height": height, "deviceScaleFactor": 1, "mobile": false}, nil)
	b.call("Emulation.setEmulatedMedia", map[string]any{"media": media, "features": []map[string]string{{"name": "prefers-color-scheme", "value": scheme}}}, nil)
}

// press sends a key to the page.
func (b *browser) press(key string) {
	b.t.Helper()
	for _, kind := range []string{"rawKeyDown", "keyUp"} {
		b.call("Input.dispatchKeyEvent", map[string]any{"type": kind, "key": key, "code": key, "windowsVirtualKeyCode": keyCodes[key]}, nil)
	}
}

var keyCodes = map[string]int{"Tab": 9, "Enter": 13, "ArrowRight": 39, "ArrowLeft": 37, "End": 35, "Home": 36}

// clip takes a picture of part of the page.
func (b *browser) clip(x, y, w, h float64) []byte {
	b.t.Helper()
	var got struct{ Data []byte }
	b.call("Page.captureScreenshot", map[string]any{"format": "png", "captureBeyondViewport": true,
		"clip": map[string]any{"x": x, "y": y, "width": w, "height": h, "scale": 1}}, &got)
	return got.Data
}

// pdf prints the page on paper of a size in inches.
func (b *browser) pdf(width, height float64) []byte {
	b.t.Helper()
	var got struct{ Data []byte }
	b.call("Page.printToPDF", map[string]any{"paperWidth": width, "paperHeight": height, "preferCSSPageSize": false, "printBackground": true}, &got)
	return got.Data
}

func (e event) String() string { return fmt.Sprintf("%s %s", e.Method, e.Params) }
