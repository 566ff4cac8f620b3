namespace GuideModes.Web.State;

/// <summary>Where this person's files are kept: <c>GuideModes:DataFolder</c>, or GuideModes under the local application data.</summary>
internal static class DataFolder
{
    public static string Path(IConfiguration configuration) =>
        configuration["GuideModes:DataFolder"] is { Length: > 0 } chosen
            ? chosen
            : System.IO.Path.Combine(
                Environment.GetFolderPath(Environment.SpecialFolder.LocalApplicationData, Environment.SpecialFolderOption.DoNotVerify),
                "GuideModes");

    /// <summary>A folder below it, made if need be; null where nothing can be written.</summary>
    public static DirectoryInfo? TryPrepare(IConfiguration configuration, string name)
    {
        try
        {
            return Directory.CreateDirectory(System.IO.Path.Combine(Path(configuration), name));
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return null;
        }
    }
}
