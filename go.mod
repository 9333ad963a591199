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
	github.com/ledongthuc/pdf v0.0.0-20260907135840-6c8c28e0e8a0 // indirect
	github.com/makiuchi-d/gozxing v0.1.1 // indirect
	golang.org/x/sys v0.4.0 // indirect
	golang.org/x/text v0.23.0 // indirect
	golang.org/x/xerrors v0.0.0-20200804184101-5ec99f83aff1 // indirect
)

ignore ./site/node_modules
