module strikebook

go 1.26

require (
	github.com/andybalholm/brotli v1.3.0
	github.com/chromedp/cdproto v0.160.1
	github.com/chromedp/chromedp v0.23.1
	github.com/evanw/esbuild v0.28.2
	github.com/hack-pad/safejs v0.1.0
	gonum.org/v1/gonum v0.17.0
)

require (
	github.com/go-json-experiment/json v0.0.0-20260213210345-44df1a37e875 // indirect
	golang.org/x/sys v0.4.0 // indirect
)

ignore ./site/node_modules
