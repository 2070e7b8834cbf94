#include <cstdio>

#include "io/command_line.hpp"

int main(int argc, char** argv) { return barwall::io::run_program(argc, argv); }
