// Build tool: embed_font FONT.ttf NAME OUT.cpp writes the font as a zlib stream in a C++ array.
#include <stb/stb_image_write.h>

#include <cstdint>
#include <cstdio>
#include <cstdlib>
#include <cstring>
#include <fstream>
#include <iterator>
#include <vector>

// Part of stb_image_write, not in its header.
extern "C" unsigned char* stbi_zlib_compress(unsigned char* data, int data_len, int* out_len, int quality);

int main(int argc, char** argv) {
  if (argc != 4) {
    std::fprintf(stderr, "usage: embed_font FONT.ttf NAME OUT.cpp\n");
    return 2;
  }
  std::ifstream in(argv[1], std::ios::binary);
  std::vector<char> font((std::istreambuf_iterator<char>(in)), std::istreambuf_iterator<char>());
  if (font.empty()) {
    std::fprintf(stderr, "embed_font: %s cannot be read: install Debian's package fonts-dejavu-core\n",
                 argv[1]);
    return 1;
  }
  int length = 0;
  unsigned char* packed = stbi_zlib_compress(reinterpret_cast<unsigned char*>(font.data()),
                                             static_cast<int>(font.size()), &length, 8);
  std::vector<std::uint64_t> words((static_cast<std::size_t>(length) + 7) / 8);
  std::memcpy(words.data(), packed, static_cast<std::size_t>(length));
  std::free(packed);
  std::ofstream out(argv[3]);
  out << "#include \"desktop/window/embedded_fonts.hpp\"\nnamespace heatledger::window {\nstatic const "
         "std::uint64_t words[] = {";
  // Whole words, not bytes: an eighth of the numbers for the compiler to read. Byte order is that of the
  // build machine.
  for (const std::uint64_t word : words) out << word << "u,\n";
  out << "};\nconst EmbeddedFont " << argv[2] << "{words, " << length
      << "};\n}  // namespace heatledger::window\n";
  return out.good() ? 0 : 1;
}
