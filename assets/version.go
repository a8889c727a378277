package assets

// Version is the program's, as packages are named and the app tells it.
const Version = "0.9.0"
