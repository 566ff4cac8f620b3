using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using GuideModes.Guides;

namespace GuideModes.Web.State;

/// <summary>Guides too long for a link, kept as files named after their content.</summary>
/// <remarks>The oldest give way once there are more than <see cref="Capacity"/>. Safe to share between threads.</remarks>
public sealed class DraftStore(IConfiguration configuration)
{
    public const int Capacity = 2000;

    private const int IdLength = 32;

    private readonly DirectoryInfo? _folder = DataFolder.TryPrepare(configuration, "drafts");

    /// <summary>Keeps a guide and names it; null where nothing can be written.</summary>
    public string? Save(GuideDocument document)
    {
        if (_folder is null) return null;
        var text = document.ToString();
        var id = Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(text)))[..IdLength];
        try
        {
            var path = PathOf(id);
            if (!File.Exists(path))
            {
                MakeRoom();
                var partial = $"{path}.{Environment.CurrentManagedThreadId.ToString(CultureInfo.InvariantCulture)}.part";
                File.WriteAllText(partial, text);
                File.Move(partial, path, overwrite: true);
            }

            return id;
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return null;
        }
    }

    /// <summary>The guide of that name; null where there is none.</summary>
    public GuideDocument? Find(string id)
    {
        if (_folder is null || id.Length != IdLength || !id.All(char.IsAsciiHexDigitLower)) return null;
        try
        {
            return GuideDocument.Parse(File.ReadAllText(PathOf(id)));
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or JsonException)
        {
            return null;
        }
    }

    private string PathOf(string id) => Path.Combine(_folder!.FullName, id + ".json");

    private void MakeRoom()
    {
        var drafts = _folder!.GetFiles("*.json");
        if (drafts.Length < Capacity) return;
        foreach (var draft in drafts.OrderBy(file => file.LastWriteTimeUtc).Take(drafts.Length - Capacity + 1)) draft.Delete();
    }
}
