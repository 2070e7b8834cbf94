#pragma once

#include <filesystem>
#include <functional>
#include <string>
#include <vector>

#include "io/folder_rules.hpp"
#include "io/write_error.hpp"

namespace barwall::io {

/// Writes into the folder it is given one or more of the files of some contents.
using FileWriter = std::function<void(const std::filesystem::path& folder)>;

/// Writes files into a folder whose missing parents are made: the writers fill a temporary folder
/// on the same disk, whose complete files are then moved into place, and files of the same
/// contents from an earlier run that this one did not write are removed. Whatever happens before
/// the move, the folder stays as it was; SIGINT, SIGTERM and SIGHUP take effect between two
/// writers or after the move, never within it.
/// \throws InputError, WriteError
void fill_folder(const std::filesystem::path& folder, const Case& input, Contents contents,
                 bool replace, const std::vector<FileWriter>& writers);

/// Writes a text to a new file.
/// \throws WriteError when not every byte could be written
void write_text(const std::filesystem::path& file, const std::string& text);

}  // namespace barwall::io
